import type { Trouble } from './phrases';

/** Words for troubles of the PTO drive, charging, starting, ignition and the safety circuit. */
export const POWER_TROUBLES: Readonly<Record<string, Trouble>> = {
  'PTO clutch': {
    complaints: [
      'blades quit after 20 min, ok when cold',
      'blades wont engage when hot',
      'no blades',
      'PTO cuts out in tall grass',
      'blades slow to start then squeal',
      'mower deck quits after half hour, restarts after it sits',
      'burning smell when blades are on',
      'blades drop out going uphill, comes back later',
    ],
    causes: [
      'clutch coil open hot, 3.0 ohm cold',
      'coil 1.4 ohm cold, spec 2.4-3.4, drawing 9 A',
      'air gap .032, worn past adjusting',
      'clutch bearing blue, coil cooked',
      'coil shorted to frame, tested leads off',
      'friction face glazed, slips under load',
      'clutch smoked, field wire burnt at the bracket',
    ],
    fixes: [
      'replaced clutch, torqued bolt, burnished 5+5',
      'new PTO clutch, gap set .015 all 3 slots, ran 30 min hot',
      'R&R clutch, checked anti-rotation bracket is free, blade stop under 5 sec',
      'replaced clutch assy, draws 4.1 A now',
    ],
    cures: [
      'set air gap .015 at 3 slots, engages hot now',
      'gap was .028, adjusted to .015, ran 30 min ok',
      'ADJUSTED CLUTCH GAP, TESTED HOT, OK',
    ],
  },
  'PTO switch': {
    complaints: [
      'blades wont engage',
      'pull PTO knob nothing happens',
      'blades come on and off by themselves',
      'have to wiggle PTO knob',
      'no click from clutch',
      'PTO switch feels loose',
    ],
    causes: [
      'PTO switch contacts burnt',
      'switch open between B and C',
      'terminal melted on PTO switch',
      'no volts out of PTO switch, 12.6 in',
      'switch corroded inside',
    ],
    fixes: [
      'replaced PTO switch',
      'new PTO switch, interlocks all checked',
      'R&R PTO sw, 12.4 V at clutch plug, blade stop ok',
      'installed switch, cleaned plug',
    ],
  },
  'Main fuse': {
    complaints: [
      'dead, nothing when key turned',
      'no power at all',
      'blew a fuse',
      'quit mowing and went dead',
      'key on nothing',
    ],
    causes: [
      'main fuse blown',
      '20A fuse open',
      'fuse blown, no short found',
      'fuse holder loose, fuse blown',
    ],
    fixes: [
      'replaced main fuse',
      'new 20A fuse, ran 15 min ok',
      'fuse replaced, checked harness for rub',
      'installed fuse, starts and runs',
    ],
  },
  'Voltage regulator': {
    complaints: [
      'battery keeps going dead',
      'not charging',
      'have to jump it every time',
      'lights get bright then dim',
      'battery boiled over, acid smell',
    ],
    causes: [
      'regulator putting out 16.8 V, battery cooked',
      'no DC out of regulator, stator AC good 38 V',
      '12.1 V running, regulator dead',
      'reg ground bad and burnt, output all over the place',
    ],
    fixes: [
      'replaced voltage regulator, 14.1 V at battery',
      'new regulator, cleaned ground, charging 13.9',
      'R&R reg/rectifier, checked AC from stator',
    ],
    cures: [
      'cleaned regulator ground, charging 14.0 V now',
      'ground under regulator rusty, cleaned and tightened',
    ],
  },
  Stator: {
    complaints: ['not charging', 'battery dead every week', 'dies with headlights on', 'amp light on'],
    causes: [
      'stator 0 VAC one leg',
      'stator leads rubbed through on flywheel',
      'stator windings black, 6 VAC',
    ],
    fixes: ['pulled flywheel, replaced stator, 14 V', 'new stator, routed leads clear', 'R&R stator'],
  },
  Battery: {
    complaints: [
      'wont crank',
      'just clicks',
      'needs a jump',
      'slow crank',
      'dead battery after sitting a week',
      'cranks slow then quits',
    ],
    causes: [
      'battery 9.8 V under load',
      'bad cell, 10.4 V after charge',
      'battery dry, plates showing',
      'load test fail',
      'battery swollen',
    ],
    fixes: [
      'new battery',
      'replaced battery, charging 13.8 V',
      'installed U1R, cleaned terminals',
      'batt replaced and coated posts',
    ],
    cures: ['charged overnight, load test ok 11.2 V', 'battery tested good, terminals cleaned'],
  },
  'Battery cable': {
    complaints: [
      'clicks but wont crank',
      'cranks sometimes',
      'solenoid clicks, no start',
      'cable hot when cranking',
      'start is hit or miss',
    ],
    causes: [
      'green inside the insulation, drops 2.1 V cranking',
      'cable chafed on deck lift shaft, strands broke',
      'positive cable corroded at lug',
      'ground cable hot, 1.6 V drop',
    ],
    fixes: [
      'replaced battery cable, 0.2 V drop cranking',
      'new pos cable, routed off the lift shaft',
      'R&R cable, cleaned frame ground',
    ],
    cures: [
      'cleaned ground lug to bare metal, cranks strong',
      'cleaned and tightened cable ends, drop 0.2 V',
    ],
  },
  'Starter solenoid': {
    complaints: [
      'clicks only',
      'wont crank, one click',
      'starter keeps running after key off',
      'have to hit the key 10 times',
      'no crank',
    ],
    causes: [
      'solenoid contacts burnt',
      'solenoid 12 V in, 7 out',
      'solenoid welded shut',
      'solenoid coil open',
    ],
    fixes: [
      'replaced solenoid',
      'new starter solenoid, cranks every time x10',
      'R&R solenoid, start interlocks checked',
    ],
  },
  'Starter motor': {
    complaints: [
      'starter grinds',
      'starter spins wont turn engine',
      'no crank, smoke',
      'starter drags when hot',
    ],
    causes: [
      'starter gear stripped',
      'brushes gone, draws 190 A',
      'starter bushing worn, armature dragging',
      'bendix sticks',
    ],
    fixes: ['replaced starter', 'new starter, checked ring gear', 'R&R starter motor, cranks good'],
  },
  'Recoil starter': {
    complaints: ['rope broke', 'pull cord wont go back', 'rope pulls, engine doesnt turn', 'cord stuck'],
    causes: ['recoil spring broke', 'pawls worn', 'rope frayed at handle', 'pulley cracked'],
    fixes: ['new recoil assy', 'replaced recoil', 'R&R recoil starter'],
    cures: ['new rope from spool, spring ok', 'rewound spring and retied rope', 'fixed rope, lubed pawls'],
  },
  'Spark plug': {
    complaints: ['runs rough', 'hard start', 'misses under load', 'black smoke, no power'],
    causes: ['plug fouled', 'plug gap .060', 'cracked porcelain', 'plugs oily on #2'],
    fixes: ['new plugs gapped .030', 'replaced plug', 'plugs, good spark'],
  },
  'Ignition coil': {
    complaints: [
      'quits when hot, no spark',
      'dies after 30 min, restarts cold',
      'no spark',
      'runs on one cylinder',
      'popping and backfiring when warm',
    ],
    causes: [
      'coil opens hot, spark ok cold',
      'no spark #1 with kill wire off',
      'coil secondary open',
      'module breaks down at temp, checked w/ tester',
    ],
    fixes: [
      'new coil, gap .010',
      'replaced ignition coil, ran 30 min',
      'R&R ign module, kill circuit checked',
    ],
  },
  'Flywheel key': {
    complaints: [
      'hit a stump, wont start',
      'kicks back when pulled',
      'hit rock now pops',
      'wont start after hitting root',
    ],
    causes: ['flywheel key sheared half', 'key sheared, crank checks straight', 'timing off, key'],
    fixes: [
      'new key, torqued flywheel, checked crank runout',
      'replaced flywheel key',
      'key and blade bolt checked',
    ],
  },
  'Seat switch': {
    complaints: [
      'dies when blades turned on',
      'quits on bumps',
      'shuts off when I lean',
      'engine dies when PTO on',
    ],
    causes: [
      'seat switch open w/ weight on',
      'seat switch intermittent on wiggle test',
      'water in seat switch plug',
      'seat switch spring gone',
    ],
    fixes: [
      'replaced seat switch, interlock check list all ok',
      'new seat sw, dies off seat as it should',
      'R&R seat switch. jumpered for test only, restored, tested',
    ],
    cures: [
      'cleaned seat switch plug, interlocks test ok',
      'cleaned connector, dielectric grease, checked off-seat kill',
    ],
  },
  'Brake switch': {
    complaints: [
      'wont crank unless brake is stomped',
      'no crank',
      'dies when brake let out',
      'starts only sometimes',
    ],
    causes: ['brake switch out of adjustment', 'brake switch open', 'plunger stuck', 'switch bracket bent'],
    fixes: [
      'replaced brake switch, start interlock ok',
      'new brake sw, tested brake off no crank',
      'R&R brake interlock switch',
    ],
    cures: [
      'adjusted brake switch bracket, no crank w/ brake off',
      'bracket straightened and adjusted, all interlocks ok',
    ],
  },
  'Neutral switch': {
    complaints: [
      'dies when lap bars opened',
      'no crank bars out',
      'cranks only with left bar held',
      'quits when I pull bars in',
    ],
    causes: [
      'LH neutral switch open',
      'neutral switch wet',
      'switch plunger worn',
      'neutral sw lead broke at plug',
    ],
    fixes: [
      'replaced neutral switch, both sides tested',
      'new neutral sw LH',
      'R&R lap bar switch, interlocks ok',
    ],
    cures: ['adjusted neutral switch, tests ok both bars', 'bar stop adjusted, switch makes now'],
  },
  'Hour meter': {
    complaints: ['hour meter quit', 'meter stuck', 'hour meter blank'],
    causes: ['meter dead, 12 V present', 'display cracked', 'meter failed'],
    fixes: ['new hour meter starts at 0', 'replaced hour meter', 'R&R meter, old reading on ticket'],
  },
};
