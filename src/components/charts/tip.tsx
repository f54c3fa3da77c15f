/** What hover and focus say of one point: a heading, then lines with their counts. */
export type Tip = { heading: string; lines: readonly string[] };

type Props = { active?: boolean; payload?: readonly { payload?: unknown }[] };

/** For `<Tooltip content={<TipContent />} />`: each datum of the chart carries its `tip`. */
export function TipContent({ active, payload }: Props) {
  const datum = payload?.[0]?.payload;
  if (!active || !hasTip(datum)) return null;
  return <TipCard tip={datum.tip} />;
}

export function TipCard({ tip }: { tip: Tip }) {
  return (
    <div className="max-w-[20rem] rounded-bench border border-edge bg-sheet px-3 py-2 text-sm text-ink shadow-bench">
      <p className="font-heading">{tip.heading}</p>
      {tip.lines.map((line) => (
        <p key={line}>{line}</p>
      ))}
    </div>
  );
}

function hasTip(datum: unknown): datum is { tip: Tip } {
  return typeof datum === 'object' && datum !== null && 'tip' in datum;
}
