import type { MonthReview } from '../../../shared/reports';

type Waiting = {
  toReview: number;
  unidentified: number;
  unknownReasons: number;
  undecidedComponents: number;
};

/** What a person could do today, most useful first; each leads to where it is done. */
export function todosOf(waiting: Waiting): MonthReview['todos'] {
  const { toReview, unidentified, unknownReasons, undecidedComponents } = waiting;
  const todos: MonthReview['todos'] = [
    {
      kind: 'review_comebacks',
      text: `Look at ${counted(toReview, 'return')}`,
      detail: 'Say whether each was a comeback, and why.',
      count: toReview,
      path: '/comebacks?status=suggested',
    },
    {
      kind: 'decide_components',
      text: `Say of ${counted(undecidedComponents, 'component')} when they are changed`,
      detail: `${counted(unknownReasons, 'part line')} without a reason: a rule for the component may settle them.`,
      count: undecidedComponents,
      path: '/parts',
    },
    {
      kind: 'identify_machines',
      text: `${counted(unidentified, 'repair')} without a machine`,
      detail: 'They count as work done and stay out of rates of return.',
      count: unidentified,
      path: '/repairs',
    },
  ];
  return todos.filter(({ count }) => count > 0);
}

const counted = (count: number, what: string) =>
  `${count.toLocaleString('en-US')} ${what}${count === 1 ? '' : 's'}`;
