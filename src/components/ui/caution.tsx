/** Stands wherever a page suggests work near blades, belts, fuel or wiring. */
export function Caution() {
  return (
    <aside aria-label="Before you work on it" className="border-l-2 border-brass py-1 pl-4 text-sm text-dim">
      <p>
        <span className="font-heading text-brass">Before you work on it: </span>
        key out, spark plug lead off, battery negative off, blades blocked, engine cool, a lifted machine on
        stands. Where it must run for a test: brake set, hands clear of blades and belts, nobody near. The
        maker’s service manual and local rules decide; a safety switch stays in work.
      </p>
    </aside>
  );
}
