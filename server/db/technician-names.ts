import { foldText } from './fold';

const BETWEEN_NAMES = /\s*[/;&+]\s*|\s+and\s+/i;

/** The names in a technician field, each once: `A / B`, `A; B`, `A & B`, `A + B`, `A and B`. A comma may be part of one name. */
export function namesIn(text: string | null): string[] {
  const names = (text ?? '')
    .split(BETWEEN_NAMES)
    .map((name) => name.trim().replace(/\s+/g, ' '))
    .filter((name) => name !== '');
  // The first spelling is the one that is kept.
  return [...new Map(names.toReversed().map((name) => [foldText(name), name])).values()].toReversed();
}
