import type { DeclaredChain } from './types';

/**
 * Chains that the trade knows before any record is looked at, cause → result, by generic component names. They are
 * tested as a small list of their own; a shop passes its own list to replace it.
 */
const CHAINS: readonly (readonly [causal: string, ...resultants: string[]])[] = [
  ['PTO clutch', 'PTO switch', 'PTO relay', 'main fuse', 'fuse holder', 'ignition switch'],
  ['suppression diode', 'PTO switch', 'PTO relay', 'main fuse'],
  ['spindle bearing', 'deck belt', 'PTO clutch', 'idler pulley'],
  ['spindle', 'deck belt', 'PTO clutch'],
  ['idler pulley', 'deck belt', 'drive belt', 'PTO clutch'],
  ['idler bearing', 'deck belt', 'drive belt', 'PTO clutch'],
  ['deck pulley', 'deck belt'],
  ['belt guide', 'deck belt'],
  ['voltage regulator', 'battery', 'PTO clutch', 'hour meter', 'ignition module', 'headlamp'],
  ['stator', 'battery', 'voltage regulator', 'PTO clutch'],
  ['alternator', 'battery', 'PTO clutch'],
  ['battery', 'starter solenoid', 'PTO clutch'],
  ['battery cable', 'starter solenoid', 'starter'],
  ['starter solenoid', 'starter', 'starter gear'],
  ['cooling fins', 'push rod', 'head gasket', 'valve guide'],
  ['breather', 'head gasket', 'air filter'],
  ['needle and seat', 'engine oil', 'connecting rod', 'starter'],
  ['carburetor', 'spark plug', 'connecting rod'],
  ['fuel pump', 'connecting rod', 'carburetor'],
  ['fuel tank', 'fuel filter', 'carburetor', 'fuel shutoff solenoid'],
  ['air filter', 'piston rings', 'spark plug'],
  ['oil pump', 'connecting rod', 'crankshaft'],
  ['governor', 'connecting rod'],
  ['blade', 'flywheel key', 'crankshaft', 'spindle bearing', 'spindle'],
  ['blade adapter', 'crankshaft', 'blade'],
  ['hydro fan', 'hydro pump', 'wheel motor', 'drive belt'],
  ['hydro pump', 'drive belt'],
  ['anti-rotation bracket', 'PTO clutch'],
  ['seat switch', 'PTO clutch', 'PTO relay'],
  ['wiring harness', 'main fuse'],
];

export const declaredChains: readonly DeclaredChain[] = CHAINS.flatMap(([causal, ...resultants]) =>
  resultants.map((resultant) => ({ causal, resultant })),
);

/** Names match whatever their case, spaces and hyphens. */
export const foldName = (name: string) =>
  name
    .trim()
    .toLowerCase()
    .replace(/[\s\-_/]+/g, ' ');
