import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import type { ImportState } from '../../../shared/imports';
import { isSettled } from './import-words';

/** Once an import that was watched has settled, every figure that was fetched before is out of date. */
export function useNews(state: ImportState): void {
  const client = useQueryClient();
  const hasWaited = useRef(false);
  const isOver = isSettled(state);
  useEffect(() => {
    if (isOver && hasWaited.current) {
      void client.invalidateQueries({
        predicate: ({ queryKey }) => queryKey[1] !== 'detail' || queryKey[0] !== 'imports',
      });
    }
    hasWaited.current = !isOver;
  }, [client, isOver]);
}
