import { useQuery } from '@tanstack/react-query';
import { useFormats } from '../../lib/session';
import { ErrorPanel } from '../../components/ui/error-panel';
import { Skeleton } from '../../components/ui/skeleton';
import { isUnderWay } from './import-words';
import { Outcome } from './outcome';
import { Progress } from './progress';
import { importQuery } from './queries';
import { Rejected } from './rejected';

/** What would happen, with nothing taken in. */
export function Trial({ id }: { id: string }) {
  const { data: state, error } = useQuery(importQuery(id));
  const formats = useFormats();
  return (
    <section aria-label="What would happen" className="mt-5 border-t border-rule pt-4">
      {error && !state && <ErrorPanel error={error} />}
      {!state && !error && <Skeleton className="h-6 w-2/3" />}
      {state && <Progress state={state} formats={formats} />}
      {state && !isUnderWay(state) && (
        <div className="mt-3 flex flex-col gap-5">
          <Outcome state={state} formats={formats} />
          {state.rejected > 0 && <Rejected importState={state} />}
        </div>
      )}
    </section>
  );
}
