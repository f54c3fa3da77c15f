import type { ComponentListed } from '../../../shared/parts';
import { Select } from '../../components/ui/select';
import { useChangeComponent, type ComponentKind } from './queries';

export const KINDS: readonly { value: ComponentKind; label: string; meaning: string }[] = [
  {
    value: 'service_item',
    label: 'service item',
    meaning: 'Changed by the calendar or the hours. Without a reason on the line it counts as maintenance.',
  },
  {
    value: 'only_when_bad',
    label: 'only changed when bad',
    meaning: 'Nobody replaces one that works. Without a reason on the line it counts as failed.',
  },
  {
    value: 'depends',
    label: 'it depends',
    meaning: 'Sometimes worn, sometimes changed along with other work. Without a reason it stays unknown.',
  },
  { value: 'unset', label: 'not said', meaning: 'Nobody has said yet. Without a reason it stays unknown.' },
];

export const kindLabel = (kind: ComponentKind): string =>
  KINDS.find(({ value }) => value === kind)?.label ?? 'not said';

/** What the shop says of a component, changed where it stands. */
export function KindSelect({ component }: { component: ComponentListed }) {
  const change = useChangeComponent();
  return (
    <Select
      look="picker"
      label={`How ${component.name} is replaced`}
      value={change.isPending ? (change.variables.change.kind ?? component.kind) : component.kind}
      onChange={(value) => {
        const kind = KINDS.find((option) => option.value === value)?.value;
        if (kind) change.mutate({ id: component.id, change: { kind } });
      }}
      options={KINDS}
      isDisabled={change.isPending}
    />
  );
}

/** What each choice does to lines without a reason. */
export function KindMeanings() {
  return (
    <dl className="grid gap-x-6 gap-y-2 text-sm sm:grid-cols-2 desk:grid-cols-4">
      {KINDS.map(({ value, label, meaning }) => (
        <div key={value}>
          <dt className="font-label">{label}</dt>
          <dd className="text-dim">{meaning}</dd>
        </div>
      ))}
    </dl>
  );
}
