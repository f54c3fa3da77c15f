import { fireEvent, render } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { shareTicks } from '../../src/components/charts/axes';
import { MonthChart, type MonthPoint } from '../../src/components/charts/month-chart';

const point = (month: string, rate: number, given: Partial<MonthPoint> = {}): MonthPoint => ({
  month,
  letter: 'M',
  rate,
  lower: rate - 0.03,
  upper: rate + 0.04,
  limitLower: 0.01,
  limitUpper: 0.13,
  isMaturing: false,
  projected: null,
  isChosen: false,
  rateText: `${(rate * 100).toFixed(1)} %`,
  tip: { heading: `heading ${month}`, lines: ['31 of 212 repairs'] },
  ...given,
});

function draw(points: MonthPoint[], center: number | null = 0.076) {
  return render(
    <MonthChart
      points={points}
      center={center}
      centerText="7.6 %"
      tickText={(share) => `${Math.round(share * 100)} %`}
      heightPx={320}
      label="By month"
    />,
  ).container;
}

describe('the month’s chart', () => {
  it('labels what lies outside its limits, by shape and by words', () => {
    const chart = draw([point('2026-03', 0.08), point('2026-04', 0.146)]);
    expect(chart.textContent).toContain('14.6 %');
    expect(chart.textContent).not.toContain('8.0 %');
    expect(chart.textContent).toContain('average7.6 %');
  });

  it('draws an open month as a dot on its way to a ring, over hatching', () => {
    const chart = draw([
      point('2026-03', 0.08),
      point('2026-04', 0.02, { isMaturing: true, projected: 0.08 }),
    ]);
    expect(chart.querySelectorAll('pattern')).toHaveLength(1);
    expect(chart.querySelectorAll('circle')).toHaveLength(3);
    expect(draw([point('2026-03', 0.08)]).querySelectorAll('pattern')).toHaveLength(0);
  });

  it('never says that an open month is outside its limits', () => {
    const chart = draw([point('2026-04', 0.2, { isMaturing: true, projected: 0.3 })]);
    expect(chart.textContent).not.toContain('20.0 %');
  });

  it('draws no limit where there is none', () => {
    const chart = draw([point('2026-03', 0.08, { limitLower: null, limitUpper: null })], null);
    expect(chart.textContent).not.toContain('limit');
    expect(chart.textContent).not.toContain('average');
  });

  it('says the counts of a month to the keyboard too', () => {
    const chart = draw([point('2026-03', 0.08), point('2026-04', 0.146)]);
    const surface = chart.querySelector<SVGElement>('svg[tabindex="0"]');
    if (!surface) throw new Error('the chart cannot be focused');
    fireEvent.focus(surface);
    expect(chart.textContent).toContain('31 of 212 repairs');
  });
});

describe('the scale of shares', () => {
  it.each([
    [0.05, 0.06],
    [0.146, 0.15],
    [0.2, 0.2],
    [0.45, 0.5],
    [1.2, 1],
  ])('reaches at least %s with round steps', (highest, top) => {
    const ticks = shareTicks(highest);
    expect(ticks[0]).toBe(0);
    expect(ticks.at(-1)).toBe(top);
  });
});
