import { useMutation, useQueryClient, type QueryKey } from '@tanstack/react-query';
import { notify } from '../components/ui/toast-store';

type Options = {
  /** What is no longer true afterwards; everything where absent. */
  stale?: QueryKey;
  /** Said in the corner once it is done. */
  said?: string;
  /** A form puts errors beside its fields itself. */
  isForm?: boolean;
};

/** A change on the server: what it made stale is read anew, what went wrong is said. */
export function useChange<Input, Answer>(change: (input: Input) => Promise<Answer>, options: Options = {}) {
  const { stale, said, isForm = false } = options;
  const client = useQueryClient();
  return useMutation({
    mutationFn: change,
    onSuccess: async () => {
      await client.invalidateQueries(stale ? { queryKey: stale } : {});
      if (said) notify(said);
    },
    onError: (error) => {
      if (!isForm) notify(error.message, 'failed');
    },
  });
}
