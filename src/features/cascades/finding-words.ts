import type { Finding } from '../../../shared/findings';
import type { Formats } from '../../lib/format';

type Counted = Finding['leftIn'];

/** On which machines the finding holds. */
export function whereOf({ maker, model, family }: Pick<Finding, 'maker' | 'model' | 'family'>): string {
  const name = `${maker} ${model}`.trim();
  return name || (family ? `family ${family.name}` : 'all models');
}

/** Inside a sentence components are written as things, "the PTO clutch". */
export const thing = (name: string): string => `the ${lowered(name)}`;

/** "Deck belt" becomes "deck belt"; "PTO clutch" keeps its capitals. */
export function lowered(name: string): string {
  return /^[A-Z][a-z]/.test(name) ? `${name.charAt(0).toLowerCase()}${name.slice(1)}` : name;
}

/** "31 of 44 (56–82 %)" */
export function countedShare({ returns, of, interval }: Counted, formats: Formats): string {
  if (of === 0) return 'none judged';
  return `${formats.count(returns)} of ${formats.count(of)} (${formats.percentRange(interval, 0)})`;
}

/** How many times as likely, with limits; a side without any return has no upper end. */
export function ratioWords(
  ratio: number | null,
  limits: Finding['returnRatioInterval'],
  formats: Formats,
): string | null {
  if (ratio !== null) {
    const digits = ratio < 10 ? 1 : 0;
    return `${formats.number(ratio, digits)} times (${formats.range(limits, digits)})`;
  }
  return limits.lower === null ? null : `at least ${formats.number(limits.lower, 1)} times`;
}

export function chanceWords(qValue: number, formats: Formats): string {
  return qValue < 0.001 ? 'q < 0.001' : `q = ${formats.number(qValue, 3)}`;
}

export const EVIDENCE_WORDS: Record<Finding['evidence'], { short: string; long: string }> = {
  seen_together: {
    short: 'seen together',
    long: 'They fail near each other oftener than their ages explain. Nothing more is shown.',
  },
  replaced_before: {
    short: 'replaced before',
    long: 'The trouble went on until the other part was replaced. That is a good reason to test it, not yet a cause.',
  },
  tested_as_cause: {
    short: 'tested as cause',
    long: 'A reading, or a bench test of the removed part, says so.',
  },
};

/**
 * How strong, 0 to 1, on a log scale from as likely to thirty times as likely. From the counts, with half a return
 * added to each side, so that no return at all is not infinitely strong.
 */
export function strengthOf(findings: readonly Finding[]): number {
  const sum = (of: (finding: Finding) => number) =>
    findings.reduce((total, finding) => total + of(finding), 0);
  const left = (sum(({ leftIn }) => leftIn.returns) + 0.5) / (sum(({ leftIn }) => leftIn.of) + 1);
  const replaced =
    (sum(({ replaced: both }) => both.returns) + 0.5) / (sum(({ replaced: both }) => both.of) + 1);
  return Math.min(1, Math.max(0, Math.log(left / replaced) / Math.log(30)));
}
