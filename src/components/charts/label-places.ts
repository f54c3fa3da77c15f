export type Labeled = { id: string; name: string; x: number; y: number };
export type LabelPlace = { x: number; y: number; anchor: 'start' | 'middle' | 'end' };
type Box = { left: number; right: number; top: number; bottom: number };
type Area = { left: number; right: number; top: number; bottom: number };

const LETTER_PX = 7;
const HALF_PX = 7;
const MARK_PX = 8;

/** A place beside each mark where its name covers no other name or mark, and stays within the plot. */
export function labelPlaces(marks: readonly Labeled[], area: Area): Map<string, LabelPlace> {
  const taken: { id: string; box: Box }[] = marks.map(({ id, x, y }) => ({
    id,
    box: { left: x - MARK_PX, right: x + MARK_PX, top: y - MARK_PX, bottom: y + MARK_PX },
  }));
  const places = new Map<string, LabelPlace>();
  for (const mark of marks) {
    const width = mark.name.length * LETTER_PX;
    const tried = candidates(mark).map((place) => ({ place, box: boxOf(place, width) }));
    const chosen =
      tried.find(
        ({ box }) => isWithin(box, area) && !taken.some((one) => one.id !== mark.id && meets(box, one.box)),
      ) ??
      tried.find(({ box }) => isWithin(box, area)) ??
      tried[0];
    if (!chosen) continue;
    places.set(mark.id, chosen.place);
    taken.push({ id: `name of ${mark.id}`, box: chosen.box });
  }
  return places;
}

const candidates = ({ x, y }: Labeled): LabelPlace[] => [
  { x: x + 10, y, anchor: 'start' },
  { x: x - 10, y, anchor: 'end' },
  { x, y: y - 15, anchor: 'middle' },
  { x, y: y + 15, anchor: 'middle' },
  { x, y: y - 15, anchor: 'end' },
  { x, y: y + 15, anchor: 'start' },
  { x, y: y - 30, anchor: 'middle' },
  { x, y: y + 30, anchor: 'middle' },
];

function boxOf({ x, y, anchor }: LabelPlace, width: number): Box {
  const left = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2;
  return { left, right: left + width, top: y - HALF_PX, bottom: y + HALF_PX };
}

const isWithin = (box: Box, area: Area) =>
  box.left >= area.left && box.right <= area.right && box.top >= area.top && box.bottom <= area.bottom;

const meets = (a: Box, b: Box) =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
