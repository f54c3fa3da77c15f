/** The address with some of its filters changed; what is undefined or empty goes. */
export function withChanges(
  search: URLSearchParams,
  changes: Readonly<Record<string, string | undefined>>,
): URLSearchParams {
  const next = new URLSearchParams(search);
  for (const [name, value] of Object.entries(changes)) {
    if (value) next.set(name, value);
    else next.delete(name);
  }
  return next;
}
