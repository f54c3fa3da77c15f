import type { PartLife } from '../../../shared/parts';
import type { StepCurve, StepMark, StepTickText } from '../../components/charts/step-chart';
import type { Ages } from '../../lib/ages';
import type { Formats } from '../../lib/format';
import { bLifeOf, oldestSeen } from './life-words';

const LINE_POINTS = 120;

export function curveOf(
  name: string,
  life: PartLife,
  ages: Ages,
  formats: Formats,
  isNamed: boolean,
): StepCurve {
  return {
    name,
    end: oldestSeen(life),
    points: life.kaplanMeier.map((row) => ({
      at: row.time,
      value: row.survival,
      lower: row.lower,
      upper: row.upper,
      tip: {
        heading: isNamed ? `${name}, ${ages.of(row.time)}` : ages.of(row.time),
        lines: [
          `${formats.percent(row.survival)} still running${
            row.lower === null || row.upper === null ? '' : ` (${formats.percentRange(row)})`
          }`,
          `${formats.count(row.failures)} failed here, of ${formats.count(row.atRisk)} running`,
        ],
      },
    })),
  };
}

/** The fitted line; steeper at its start for parts that fail young, so that points lie denser there. */
export function lineOf({ weibull }: PartLife, end: number): { at: number; value: number }[] {
  if (weibull.kind === 'notEstimable' || end <= 0) return [];
  const { shape, scale } = weibull;
  return Array.from({ length: LINE_POINTS + 1 }, (_, index) => {
    const at = end * (index / LINE_POINTS) ** 2;
    return { at, value: Math.exp(-((at / scale) ** shape)) };
  });
}

export function marksOf({ weibull }: PartLife, ages: Ages): StepMark[] {
  return [
    { percent: 10, words: 'one in ten' },
    { percent: 50, words: 'half' },
  ].flatMap(({ percent, words }) => {
    const life = bLifeOf(weibull, percent);
    if (!life) return [];
    const { estimate, lower, upper } = life;
    return [
      { at: estimate, value: 1 - percent / 100, lower, upper, text: `${words} by ${ages.of(estimate)}` },
    ];
  });
}

/** The ages at which the answer counts who is running; the last one bears the unit. */
export function ticksOf({ atRiskAt }: PartLife, ages: Ages, formats: Formats): StepTickText[] {
  return atRiskAt.map(({ time, atRisk }, index) => ({
    at: time,
    text:
      index === atRiskAt.length - 1 && index > 0
        ? `${ages.tick(time)}\u202f${ages.unit === 'hours' ? 'h' : 'mo'}`
        : ages.tick(time),
    under: formats.count(atRisk),
  }));
}
