/** What of a failed check is needed to say it plainly. */
type Issue = {
  code?: string;
  origin?: string;
  minimum?: number | bigint;
  maximum?: number | bigint;
  expected?: string;
  input?: unknown;
};

/** Words for checks to which the schema gives none of its own; undefined leaves the library's. */
export function plainError(issue: Issue): string | undefined {
  const { code, origin, minimum, maximum } = issue;
  const isNumber = origin === 'number' || origin === 'int';
  if (code === 'too_small') {
    if (isNumber) return `This must be ${minimum} or more.`;
    if (origin === 'array') return 'Choose at least one.';
    return minimum === 1 ? 'This cannot be empty.' : `Use at least ${minimum} characters.`;
  }
  if (code === 'too_big') {
    return isNumber ? `This must be ${maximum} or less.` : `Use at most ${maximum} characters.`;
  }
  if (code === 'invalid_type') {
    if (issue.expected === 'number') return 'Write a number.';
    if (issue.expected === 'int') return 'Write a whole number.';
    return 'This is missing.';
  }
  if (code === 'invalid_format') return 'This is not written as expected.';
  if (code === 'invalid_value') return 'Choose one of the list.';
  return undefined;
}
