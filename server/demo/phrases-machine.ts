import type { Trouble } from './phrases';

/** Words for troubles of fuel, engine, deck, drive and chassis. */
export const MACHINE_TROUBLES: Readonly<Record<string, Trouble>> = {
  Carburetor: {
    complaints: [
      'wont start',
      'surging',
      'runs only on choke',
      'gas running out of carb',
      'starts then dies',
      'no power, blubbering',
      'leaks gas when parked',
    ],
    causes: [
      'carb varnished',
      'main jet plugged',
      'needle and seat leaking',
      'old fuel, bowl full of water',
      'pilot circuit plugged',
      'float sunk',
    ],
    fixes: [
      'new carb, fresh fuel, 3550 rpm no load',
      'replaced carburetor',
      'R&R carb, new gaskets, set governed speed',
    ],
    cures: [
      'cleaned carb, fresh gas, runs good',
      'carb cleaned and jets blown out',
      'drained old fuel, cleaned bowl, runs',
    ],
  },
  'Fuel pump': {
    complaints: [
      'dies after 10 min like out of gas',
      'starves going uphill',
      'wont pull fuel',
      'runs out of gas with full tank',
    ],
    causes: [
      'pump diaphragm torn',
      'no pulse flow, 0 output',
      'fuel pump weak, line ok',
      'pump cracked, sucking air',
    ],
    fixes: ['new fuel pump', 'replaced pump, checked oil for gas', 'R&R fuel pump and clamps'],
  },
  'Fuel filter': {
    complaints: ['loses power', 'surges at full throttle', 'starves for fuel'],
    causes: ['filter plugged', 'filter black w/ dirt', 'water in filter'],
    fixes: ['new fuel filter', 'replaced filter, flushed line'],
  },
  'Fuel line': {
    complaints: ['gas smell', 'leaking gas', 'gas on the floor', 'primer wont pump'],
    causes: ['fuel line cracked at barb', 'line rotten', 'line soft and split', 'grommet leaking'],
    fixes: ['new fuel line and clamps', 'replaced line tank to filter', 'cut and replaced hose, no leaks'],
  },
  'Deck belt': {
    complaints: [
      'belt broke',
      'throws belt',
      'squealing from deck',
      'deck quit turning',
      'burnt rubber smell',
      'blades slow in thick grass',
    ],
    causes: [
      'deck belt broke',
      'belt glazed and stretched',
      'belt rolled over, cords showing',
      'belt burnt one spot',
    ],
    fixes: [
      'new deck belt',
      'replaced deck belt, cleared grass from covers',
      'R&R deck belt, idlers spin free',
      'installed belt, set tension',
    ],
  },
  'Spindle bearing': {
    complaints: [
      'deck howls',
      'grinding from deck',
      'squeals and throws belt',
      'blade wobbles',
      'deck vibrates bad',
      'smokes at left spindle',
    ],
    causes: [
      'center spindle bearing seized, took the belt',
      'LH spindle brg rough, drags by hand',
      'spindle bearing rusted, grass packed',
      'RH spindle play 1/8 in',
    ],
    fixes: [
      'new spindle bearings, all spin free',
      'replaced LH spindle brgs, greased',
      'R&R bearings center spindle, belt line checked',
    ],
  },
  'Blade set': {
    complaints: ['cuts ragged', 'leaves strips', 'uneven cut', 'vibrates when blades on'],
    causes: ['blades worn out', 'blade bent', 'blade tips gone', 'blades out of balance'],
    fixes: ['new blades, torqued', 'replaced blades, leveled deck', 'installed 3 blades'],
    cures: ['sharpened and balanced blades', 'sharpened, leveled deck 1/4 in rake'],
  },
  'Deck idler pulley': {
    complaints: ['chirp from deck', 'squeal when blades on', 'belt came off', 'deck noise'],
    causes: ['idler bearing dry', 'idler pulley wobbles', 'idler bent', 'idler bearing locked'],
    fixes: ['new idler pulley', 'replaced deck idler, spring ok', 'R&R flat idler'],
  },
  'Trimmer head': {
    complaints: ['line wont feed', 'head flew apart', 'eats line', 'bump head stuck'],
    causes: ['bump knob worn through', 'spool melted', 'head cracked'],
    fixes: ['new trimmer head', 'replaced head, loaded line'],
  },
  'Drive belt': {
    complaints: [
      'wont pull',
      'no drive',
      'slow uphill',
      'belt smell, wont move',
      'quit moving',
      'jerks when starting out',
    ],
    causes: [
      'drive belt broke',
      'traction belt glazed',
      'belt stretched, idler at end of slot',
      'belt off and chewed',
    ],
    fixes: [
      'new drive belt',
      'replaced traction belt',
      'R&R drive belt, guides checked',
      'belt installed, drives good',
    ],
  },
  'Drive idler pulley': {
    complaints: [
      'throws drive belt',
      'squeal when moving',
      'eats drive belts',
      'whine from under seat, wont pull',
    ],
    causes: [
      'drive idler seized, cut the belt',
      'idler arm pulley loose on bearing',
      'idler bearing out, belt runs off',
      'V idler worn sharp',
    ],
    fixes: ['new drive idler', 'replaced idler pulley, belt runs true', 'R&R V idler and bolt'],
  },
  'Hydro pump': {
    complaints: ['weak drive when hot', 'pulls to left', 'wont climb', 'whines, slow on left side'],
    causes: [
      'LH pump weak hot, fan ok',
      'pump shaft seal leaking',
      'low output, oil burnt',
      'pump internal wear',
    ],
    fixes: ['replaced hydro pump, purged', 'new pump LH, oil and filter', 'R&R pump, drives straight'],
    cures: ['adjusted tracking and neutral', 'purged air, adjusted linkage, tracks straight'],
  },
  'Drive cable': {
    complaints: ['wont self propel', 'drive wont let go', 'no drive', 'lever is loose'],
    causes: ['drive cable stretched', 'cable broke at lever', 'cable rusted', 'cable kinked'],
    fixes: ['new drive cable', 'replaced cable, adjusted', 'R&R cable'],
    cures: ['adjusted drive cable', 'took up slack in cable, drives ok'],
  },
  'Friction wheel': {
    complaints: ['wont move in snow', 'slips in 3rd', 'no drive forward'],
    causes: ['friction rubber gone', 'friction wheel oily', 'rubber chunked'],
    fixes: ['new friction wheel', 'replaced friction disc, cleaned plate'],
  },
  'Auger belt': {
    complaints: ['auger quits in deep snow', 'wont throw snow', 'auger belt smoking', 'auger wont turn'],
    causes: ['auger belt broke', 'belt glazed', 'belt stretched'],
    fixes: ['new auger belt', 'replaced auger belt, set engagement', 'belt and adjust'],
  },
  'Shear pin': {
    complaints: ['hit newspaper, auger stopped', 'one side of auger dead', 'auger wont turn LH'],
    causes: ['shear pin broke', 'pin sheared, did its job'],
    fixes: ['new shear pins both sides', 'replaced pin'],
  },
  'Caster bearing': {
    complaints: ['front wheel wobbles', 'caster squeals', 'front end shimmy'],
    causes: ['caster bearing shot', 'caster bushing worn oval', 'wheel brg rusted'],
    fixes: ['new caster bearings', 'replaced caster brgs, greased', 'R&R front wheel bearings'],
  },
  Tire: {
    complaints: ['flat tire', 'tire wont hold air', 'tire off rim'],
    causes: ['sidewall split', 'nail', 'dry rot', 'bead leak'],
    fixes: ['new tire mounted', 'replaced tire and stem'],
    cures: ['plugged tire', 'sealed bead, holds 12 psi', 'tube in, holds air'],
  },
  'Head gasket': {
    complaints: ['smokes', 'no power, oil blowing out', 'loud puffing', 'low power hot'],
    causes: ['head gasket blown between bores', 'leakdown 45 pct at gasket', 'head warped .006'],
    fixes: [
      'new head gasket, head faced, torqued in order',
      'replaced gasket, set valves',
      'R&R head, cleaned fins',
    ],
  },
  'Crankshaft seal': {
    complaints: ['oil leak', 'oil on belt', 'oil under engine', 'oil on driveway'],
    causes: ['lower crank seal leaking', 'PTO side seal hard', 'seal leaking, breather ok'],
    fixes: ['new crank seal', 'replaced lower seal, cleaned up', 'R&R oil seal'],
  },
};
