import type { SortingState } from '@tanstack/react-table';
import { useState } from 'react';
import { useSearchParams } from 'react-router';

/** A table's sort: in the address under `key` ("rate", "-rate"), else as long as the table lives. */
export function useSorting(
  key: string | undefined,
  initial: { id: string; desc: boolean } | undefined,
): [SortingState, (next: SortingState) => void] {
  const [search, setSearch] = useSearchParams();
  const [local, setLocal] = useState<SortingState>(initial ? [initial] : []);
  if (key === undefined) return [local, setLocal];
  const written = search.get(key);
  const fromAddress = written === null ? (initial ? [initial] : []) : parse(written);
  return [
    fromAddress,
    (next) =>
      setSearch(
        (old) => {
          const params = new URLSearchParams(old);
          const [first] = next;
          if (first) params.set(key, `${first.desc ? '-' : ''}${first.id}`);
          else params.delete(key);
          return params;
        },
        { replace: true, preventScrollReset: true },
      ),
  ];
}

function parse(written: string): SortingState {
  const desc = written.startsWith('-');
  const id = desc ? written.slice(1) : written;
  return id ? [{ id, desc }] : [];
}
