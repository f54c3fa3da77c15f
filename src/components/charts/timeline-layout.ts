const PX_PER_LETTER = 6.8;
const GAP_PX = 10;

export type Label = { x: number; level: number; text: string; anchor: 'start' | 'end' };

type Wanted = { x: number; text: string };

/**
 * Puts a label over each mark, on the lowest level where it hides no other; what finds no room is left to hover, focus and
 * the table.
 * @param wanted from left to right
 */
export function placeLabels(wanted: readonly Wanted[], widthPx: number, levels: number): (Label | null)[] {
  const ends = Array.from({ length: levels }, () => -Infinity);
  return wanted.map(({ x, text }) => {
    if (text === '') return null;
    const width = text.length * PX_PER_LETTER;
    const isAtEnd = x + width > widthPx;
    const from = isAtEnd ? x - width : x;
    const level = ends.findIndex((end) => end + GAP_PX <= from);
    if (level === -1 || from < 0) return null;
    // Its line down to the mark crosses the lower levels, which may hold nothing there.
    for (let below = 0; below <= level; below += 1)
      ends[below] = Math.max(ends[below] ?? 0, below === level ? from + width : x);
    return { x, level, text, anchor: isAtEnd ? 'end' : 'start' };
  });
}
