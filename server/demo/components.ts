import type { Build } from './makers';

export type System =
  | 'PTO drive'
  | 'charging'
  | 'starting'
  | 'fuel'
  | 'ignition'
  | 'cutting deck'
  | 'drive'
  | 'safety circuit'
  | 'chassis'
  | 'engine';
export type WorkDone = 'adjusted' | 'cleaned' | 'repaired' | 'tightened' | 'tested_good' | 'nothing_found';

export interface Life {
  shape: number;
  scaleHours: number;
}

export interface Component {
  name: string;
  system: System;
  builds: readonly Build[];
  /** Absent where the part is only ever changed at a service. */
  life?: Life;
  familyLife?: { family: string; life: Life };
  /** How likely a look at the machine finds it worn when it is about to fail. */
  seenWorn: number;
  /** Share of yearly services that change it. */
  servicedShare?: number;
  /** A cure without a part, and how often it is enough. */
  cure?: { work: WorkDone; share: number };
  laborOp: string;
  laborHours: number;
  /** List price of each part, lowest to highest over makers, in dollars (common practice, no source). */
  price: readonly [number, number];
  quantity: number;
  /** Who numbers the part: its model, its maker, or one house number for all. */
  numbered: 'model' | 'maker' | 'universal';
  /** How the parts book, then the counter, calls it. */
  descriptions: readonly [string, ...string[]];
}

const ELECTRIC: readonly Build[] = ['tractor', 'zeroTurn', 'hydroWalk'];
const RIDERS: readonly Build[] = ['tractor', 'zeroTurn'];
const BATTERY: readonly Build[] = RIDERS;
const MOWERS: readonly Build[] = ['tractor', 'zeroTurn', 'hydroWalk', 'push'];
const FOUR_STROKE: readonly Build[] = [...MOWERS, 'snow'];
const ALL: readonly Build[] = [...FOUR_STROKE, 'handheld'];

type Work = readonly [op: string, hours: number, low: number, high: number, quantity?: number];

function component(
  name: string,
  system: System,
  builds: readonly Build[],
  life: readonly [shape: number, scaleHours: number] | null,
  [laborOp, laborHours, low, high, quantity = 1]: Work,
  descriptions: readonly [string, ...string[]],
  more: Partial<Component> = {},
): Component {
  return {
    name,
    system,
    builds,
    ...(life ? { life: { shape: life[0], scaleHours: life[1] } } : {}),
    seenWorn: 0.75,
    laborOp,
    laborHours,
    price: [low, high],
    quantity,
    numbered: 'maker',
    descriptions,
    ...more,
  };
}

const inFamily = (family: string, shape: number, scaleHours: number): Partial<Component> => ({
  familyLife: { family, life: { shape, scaleHours } },
});

/** Hours by which 63 % have failed, and how sharply; chosen for a believable shop, not taken from any machine. */
export const COMPONENTS: readonly Component[] = [
  component(
    'PTO clutch',
    'PTO drive',
    ELECTRIC,
    [2.1, 1180],
    ['PTO-10', 1.2, 236, 278],
    ['CLUTCH, ELECTRIC PTO', 'PTO CLUTCH', 'CLUTCH ASSY ELEC'],
    {
      ...inFamily('Tarnlow 38-series clutch', 1.9, 590),
      seenWorn: 0.25,
      numbered: 'model',
      cure: { work: 'adjusted', share: 0.16 },
    },
  ),
  component(
    'PTO switch',
    'PTO drive',
    ELECTRIC,
    [1.3, 3220],
    ['PTO-20', 0.4, 15, 20],
    ['SWITCH, PTO', 'PTO SW', 'SWITCH BLADE ENGAGE'],
    { seenWorn: 0.4 },
  ),
  component(
    'Main fuse',
    'charging',
    ELECTRIC,
    [1.1, 4030],
    ['ELE-05', 0.3, 3, 5],
    ['FUSE, BLADE 20A', 'FUSE 20 AMP'],
    { seenWorn: 0.3, numbered: 'universal' },
  ),
  component(
    'Voltage regulator',
    'charging',
    BATTERY,
    [1.7, 2230],
    ['ELE-30', 0.7, 46, 68],
    ['REGULATOR, VOLTAGE', 'REG/RECTIFIER'],
    {
      ...inFamily('Dunmarch DV23 engine', 2, 560),
      seenWorn: 0.4,
      cure: { work: 'cleaned', share: 0.06 },
    },
  ),
  component(
    'Stator',
    'charging',
    BATTERY,
    [1.6, 4650],
    ['ELE-35', 2.1, 92, 138],
    ['STATOR, CHARGING', 'STATOR ASSY'],
    { seenWorn: 0.4 },
  ),
  component(
    'Battery',
    'charging',
    BATTERY,
    [2, 1300],
    ['ELE-10', 0.3, 62, 88],
    ['BATTERY, 12V U1', 'BATTERY U1R 12V'],
    { numbered: 'universal', seenWorn: 0.75, cure: { work: 'tested_good', share: 0.05 } },
  ),
  component(
    'Battery cable',
    'starting',
    BATTERY,
    [1.7, 3220],
    ['ELE-15', 0.6, 14, 24],
    ['CABLE, BATTERY POS', 'BATT CABLE', 'CABLE, BATTERY NEG'],
    {
      ...inFamily('Greyhollow 42/46 deck', 1.9, 540),
      seenWorn: 0.25,
      cure: { work: 'cleaned', share: 0.12 },
    },
  ),
  component(
    'Starter solenoid',
    'starting',
    BATTERY,
    [1.5, 2050],
    ['STA-20', 0.5, 22, 34],
    ['SOLENOID, STARTER', 'STARTER RELAY SOLENOID'],
    { seenWorn: 0.4 },
  ),
  component(
    'Starter motor',
    'starting',
    BATTERY,
    [2, 1980],
    ['STA-10', 1, 118, 165],
    ['STARTER, ELECTRIC', 'STARTER MOTOR ASSY'],
    { seenWorn: 0.6 },
  ),
  component(
    'Recoil starter',
    'starting',
    ['push', 'snow', 'handheld', 'hydroWalk'],
    [1.8, 560],
    ['STA-40', 0.6, 28, 52],
    ['STARTER, RECOIL', 'RECOIL ASSY'],
    { cure: { work: 'repaired', share: 0.35 } },
  ),
  component(
    'Carburetor',
    'fuel',
    ALL,
    [1.3, 1490],
    ['FUE-10', 1.3, 74, 128],
    ['CARBURETOR ASSY', 'CARB', 'CARB ASSEMBLY'],
    { cure: { work: 'cleaned', share: 0.5 }, seenWorn: 0.5 },
  ),
  component(
    'Fuel pump',
    'fuel',
    ELECTRIC,
    [4.5, 780],
    ['FUE-30', 0.6, 24, 38],
    ['PUMP, FUEL PULSE', 'FUEL PUMP'],
    { seenWorn: 0.4 },
  ),
  component(
    'Fuel filter',
    'fuel',
    ALL,
    [1.4, 2600],
    ['FUE-05', 0.2, 5, 9],
    ['FILTER, FUEL', 'FUEL FILTER INLINE'],
    { numbered: 'universal', servicedShare: 0.3 },
  ),
  component(
    'Fuel line',
    'fuel',
    ALL,
    [2.4, 1610],
    ['FUE-20', 0.5, 4, 9],
    ['HOSE, FUEL 1/4', 'FUEL LINE BULK'],
    { numbered: 'universal', seenWorn: 0.8 },
  ),
  component(
    'Spark plug',
    'ignition',
    ALL,
    [1.6, 1800],
    ['IGN-05', 0.2, 4, 7, 2],
    ['PLUG, SPARK', 'SPARK PLUG'],
    { numbered: 'universal', servicedShare: 0.5 },
  ),
  component(
    'Ignition coil',
    'ignition',
    ALL,
    [4.5, 780],
    ['IGN-10', 0.8, 44, 72],
    ['COIL, IGNITION', 'IGN MODULE'],
    { seenWorn: 0.4 },
  ),
  component(
    'Flywheel key',
    'ignition',
    ['push', 'hydroWalk', 'tractor'],
    [1, 2360],
    ['IGN-20', 1.1, 2, 4],
    ['KEY, FLYWHEEL', 'FLYWHEEL KEY'],
    { numbered: 'universal', seenWorn: 0.1 },
  ),
  component(
    'Deck belt',
    'cutting deck',
    ELECTRIC,
    [2.4, 710],
    ['DEC-10', 0.7, 38, 66],
    ['BELT, DECK', 'DECK BELT', 'V-BELT DECK DRIVE'],
    { numbered: 'model', servicedShare: 0.22, seenWorn: 0.75 },
  ),
  component(
    'Spindle bearing',
    'cutting deck',
    MOWERS,
    [2.2, 1490],
    ['DEC-20', 1.1, 13, 21, 2],
    ['BEARING, SPINDLE', 'SPINDLE BRG', 'BEARING BLADE SPINDLE'],
    {
      ...inFamily('Oakrill fabricated deck', 2, 2880),
      seenWorn: 0.3,
    },
  ),
  component(
    'Blade set',
    'cutting deck',
    MOWERS,
    [1.8, 1050],
    ['DEC-05', 0.4, 17, 26, 3],
    ['BLADE, HIGH LIFT', 'BLADE MULCHING', 'BLADE'],
    { numbered: 'model', servicedShare: 0.45, seenWorn: 0.8, cure: { work: 'repaired', share: 0.2 } },
  ),
  component(
    'Deck idler pulley',
    'cutting deck',
    ELECTRIC,
    [2, 1800],
    ['DEC-30', 0.5, 19, 31],
    ['PULLEY, IDLER FLAT', 'IDLER DECK'],
    { seenWorn: 0.7 },
  ),
  component(
    'Trimmer head',
    'cutting deck',
    ['handheld'],
    [1.6, 160],
    ['HND-10', 0.3, 19, 29],
    ['HEAD, TRIMMER LINE', 'TRIMMER HEAD'],
    { seenWorn: 0.6 },
  ),
  component(
    'Drive belt',
    'drive',
    [...ELECTRIC, 'snow'],
    [2.3, 1180],
    ['DRV-10', 0.9, 29, 52],
    ['BELT, DRIVE', 'TRACTION BELT'],
    { numbered: 'model', servicedShare: 0.07, seenWorn: 0.7 },
  ),
  component(
    'Drive idler pulley',
    'drive',
    ELECTRIC,
    [2, 2230],
    ['DRV-20', 0.6, 21, 34],
    ['PULLEY, IDLER V', 'IDLER DRIVE'],
    {
      ...inFamily('Oakrill walk-behind deck', 2, 2380),
      seenWorn: 0.3,
    },
  ),
  component(
    'Hydro pump',
    'drive',
    ['zeroTurn', 'hydroWalk'],
    [2.1, 3220],
    ['DRV-40', 2.8, 365, 480],
    ['PUMP, HYDRO', 'HYDRO PUMP'],
    { seenWorn: 0.6, cure: { work: 'adjusted', share: 0.25 } },
  ),
  component(
    'Drive cable',
    'drive',
    ['push', 'snow'],
    [1.8, 430],
    ['DRV-30', 0.5, 17, 28],
    ['CABLE, DRIVE', 'DRIVE CONTROL CABLE'],
    { cure: { work: 'adjusted', share: 0.3 } },
  ),
  component(
    'Friction wheel',
    'drive',
    ['snow'],
    [2, 260],
    ['DRV-50', 1, 21, 33],
    ['WHEEL, FRICTION', 'FRICTION DISC RUBBER'],
    { seenWorn: 0.7 },
  ),
  component(
    'Auger belt',
    'drive',
    ['snow'],
    [2.2, 220],
    ['SNO-10', 0.8, 19, 32],
    ['BELT, AUGER', 'AUGER BELT'],
    { numbered: 'model', servicedShare: 0.25, seenWorn: 0.8 },
  ),
  component(
    'Shear pin',
    'drive',
    ['snow'],
    [1, 260],
    ['SNO-20', 0.2, 2, 4, 2],
    ['PIN, SHEAR', 'SHEAR BOLT'],
    { numbered: 'universal', seenWorn: 0.1 },
  ),
  component(
    'Seat switch',
    'safety circuit',
    RIDERS,
    [4.5, 900],
    ['SAF-10', 0.5, 17, 27],
    ['SWITCH, SEAT', 'SEAT SW'],
    { seenWorn: 0.4, cure: { work: 'cleaned', share: 0.05 } },
  ),
  component(
    'Brake switch',
    'safety circuit',
    ELECTRIC,
    [1.4, 2980],
    ['SAF-20', 0.5, 13, 21],
    ['SWITCH, BRAKE', 'BRAKE INTERLOCK SW'],
    { seenWorn: 0.3, cure: { work: 'adjusted', share: 0.3 } },
  ),
  component(
    'Neutral switch',
    'safety circuit',
    ['zeroTurn', 'hydroWalk'],
    [1.4, 3220],
    ['SAF-30', 0.5, 13, 22],
    ['SWITCH, NEUTRAL', 'NEUTRAL SW LAP BAR'],
    { seenWorn: 0.3, cure: { work: 'adjusted', share: 0.25 } },
  ),
  component(
    'Caster bearing',
    'chassis',
    ['zeroTurn', 'hydroWalk'],
    [4.5, 900],
    ['CHA-10', 0.6, 9, 16, 2],
    ['BEARING, CASTER', 'BUSHING CASTER WHEEL'],
    { seenWorn: 0.6 },
  ),
  component(
    'Tire',
    'chassis',
    [...MOWERS, 'snow'],
    [1.4, 2050],
    ['CHA-20', 0.4, 34, 68],
    ['TIRE', 'TIRE 13X5.00-6'],
    { seenWorn: 0.75, cure: { work: 'repaired', share: 0.4 } },
  ),
  component(
    'Hour meter',
    'chassis',
    ELECTRIC,
    [1.2, 5890],
    ['CHA-30', 0.3, 29, 44],
    ['METER, HOUR', 'HOUR METER'],
    { seenWorn: 0.1 },
  ),
  component('Air filter', 'engine', ALL, null, ['ENG-05', 0.2, 12, 22], ['FILTER, AIR', 'AIR FILTER W/PRE'], {
    servicedShare: 0.8,
  }),
  component('Oil filter', 'engine', ELECTRIC, null, ['ENG-06', 0.1, 9, 14], ['FILTER, OIL', 'OIL FILTER'], {
    servicedShare: 0.75,
  }),
  component(
    'Engine oil',
    'engine',
    FOUR_STROKE,
    null,
    ['ENG-07', 0.3, 6, 8, 2],
    ['OIL, 10W-30 QT', 'OIL SAE30 QT'],
    { numbered: 'universal', servicedShare: 0.8 },
  ),
  component(
    'Head gasket',
    'engine',
    FOUR_STROKE,
    [2, 2600],
    ['ENG-20', 2.6, 16, 28],
    ['GASKET, CYL HEAD', 'HEAD GASKET'],
    { seenWorn: 0.4 },
  ),
  component(
    'Crankshaft seal',
    'engine',
    FOUR_STROKE,
    [2.2, 2670],
    ['ENG-30', 1.6, 9, 15],
    ['SEAL, CRANKSHAFT', 'OIL SEAL PTO SIDE'],
    { seenWorn: 0.75 },
  ),
];

const byName = new Map(COMPONENTS.map((entry) => [entry.name, entry]));

export function componentNamed(name: string): Component {
  const found = byName.get(name);
  if (!found) throw new Error(`componentNamed requires a known component, got ${name}`);
  return found;
}

/** Pairs that wear out at one age on the same machines, and have nothing to do with each other. */
export const SAME_AGE_PAIRS = [
  ['Fuel pump', 'Ignition coil'],
  ['Caster bearing', 'Seat switch'],
] as const;

/** Pairs that a service changes together. */
export const SERVICE_PAIRS = [
  ['Air filter', 'Oil filter'],
  ['Air filter', 'Spark plug'],
  ['Blade set', 'Deck belt'],
] as const;
