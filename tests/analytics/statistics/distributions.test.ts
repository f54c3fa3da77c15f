import { describe, expect, it } from 'vitest';

import * as distributions from '../../../analytics/distributions';
import { expectClose, referenceEntries } from './reference';

type Entry = {
  kind:
    | 'chiSquareUpperTail'
    | 'chiSquareQuantile'
    | 'normalQuantile'
    | 'normalUpperTail'
    | 'betaQuantile'
    | 'binomialLowerTail'
    | 'binomialUpperTail';
  args: number[];
  value: number;
};

describe('distributions against mpmath and SciPy', () => {
  it.each(referenceEntries<Entry>('distributions'))('$kind of $args', ({ kind, args, value }) => {
    const evaluate: (...numbers: number[]) => number = distributions[kind];
    expectClose(evaluate(...args), value, 2e-12);
  });

  it('knows the certain ends of a binomial count', () => {
    expect(distributions.binomialLowerTail(5, 5, 0.3)).toBe(1);
    expect(distributions.binomialLowerTail(-1, 5, 0.3)).toBe(0);
    expect(distributions.binomialUpperTail(0, 5, 0.3)).toBe(1);
    expect(distributions.binomialUpperTail(6, 5, 0.3)).toBe(0);
  });
});
