import { foldText } from './fold';

// "DK/RM", "D. Kern & R. Mott", "Kern, Mott", "Kern and Mott", "Kern + Mott", one a line
const BETWEEN_NAMES = /\s*(?:[/&,;+|\n]|\s(?:and|with)\s)\s*/i;

/** The names in a record's technician field, each once, as they are spelled there. */
export function namesIn(text: string | null): string[] {
  const names = (text ?? '')
    .split(BETWEEN_NAMES)
    .map((name) => name.trim().replace(/\s+/g, ' '))
    .filter((name) => name !== '');
  return [...new Map(names.map((name) => [foldText(name), name])).values()];
}
