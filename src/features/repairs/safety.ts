import type { RepairWhole } from '../../../shared/repairs';

const NEAR_DANGER =
  /\b(pto|clutch|blades?|deck|spindles?|mandrels?|belts?|pulleys?|idlers?|fuel|carb\w*|tank|injector|gas|spark|plug|ignition|wir(?:e|es|ing)|harness|switch(?:es)?|fuses?|solenoid|relay|battery|starter|charging|stator|regulator|interlock)\b/i;

/** Whether a repair was done near blades, belts, fuel or wiring. */
export function isNearDanger(repair: Pick<RepairWhole, 'lines' | 'correction'>): boolean {
  const texts = repair.lines.flatMap(({ component, description }) => [component?.name, description]);
  return [...texts, repair.correction].some((text) => text && NEAR_DANGER.test(text));
}
