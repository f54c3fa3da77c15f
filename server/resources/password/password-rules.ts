import { invalid } from '../../http/errors';
import { FREQUENT_WORDS } from './frequent-passwords';

const FEWEST_DIFFERENT_CHARACTERS = 5;
const SHORTEST_TELLING_NAME = 4;
const LOOKALIKES: Record<string, string> = {
  '0': 'o',
  '1': 'i',
  '3': 'e',
  '4': 'a',
  '5': 's',
  '7': 't',
  '@': 'a',
  $: 's',
  '!': 'i',
};

// Longest first, so that `password` is taken away whole before `pass` is.
const WORDS = [...FREQUENT_WORDS].sort((a, b) => b.length - a.length);

/**
 * Refuses a new password that is long and guessed all the same: frequent words with digits around them, one
 * character or keyboard run repeated, the person's address or the shop's name.
 * @throws invalid, at `/password`.
 */
export function requireUncommonPassword(
  password: string,
  { email, shopNames }: { email: string; shopNames: readonly string[] },
): void {
  const message = reasonToRefuse(password, [email.split('@')[0] ?? '', ...shopNames]);
  if (message) throw invalid('This password is too easy to guess.', [{ path: '/password', message }]);
}

function reasonToRefuse(password: string, names: readonly string[]): string | undefined {
  const plain = lettersAndDigits(password);
  const telling = names.map(lettersAndDigits).filter((name) => name.length >= SHORTEST_TELLING_NAME);
  if (telling.some((name) => plain.includes(name)))
    return 'Leave out your e-mail address and the shop’s name.';
  if (new Set(password.toLowerCase()).size < FEWEST_DIFFERENT_CHARACTERS)
    return 'Use more different characters.';
  if (isMadeOfFrequentWords(password)) return 'This is among the passwords that are tried first.';
  return undefined;
}

/** Nothing is left when every frequent word is taken away, digits and signs put around or in place of letters or not. */
function isMadeOfFrequentWords(password: string): boolean {
  const lower = password.toLowerCase();
  const core = lower.replace(/^[^\p{L}]+|[^\p{L}]+$/gu, '');
  return [lower, withoutLookalikes(lower), withoutLookalikes(core)].some(
    (spelling) => leftOver(spelling.replace(/[^\p{L}]/gu, '')) === '',
  );
}

const withoutLookalikes = (text: string) =>
  [...text].map((character) => LOOKALIKES[character] ?? character).join('');

function leftOver(letters: string): string {
  return WORDS.reduce((rest, word) => rest.replaceAll(word, ' '), letters).replaceAll(' ', '');
}

const lettersAndDigits = (text: string) => text.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '');
