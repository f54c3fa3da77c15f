import { classNames } from '../../lib/class-names';

/** A grey place where something will stand, in its real size. */
export function Skeleton({ className }: { className?: string }) {
  return (
    <div
      aria-hidden="true"
      data-skeleton
      className={classNames('animate-pulse rounded-bench bg-rule/60', className)}
    />
  );
}

/** A page of figures before its data: sentence, picture, rows. */
export function PageSkeleton() {
  return (
    <div className="flex flex-col gap-6" role="status" aria-label="Loading">
      <div>
        <Skeleton className="h-7 w-48" />
        <div className="scribe mt-2.5" aria-hidden="true" />
      </div>
      <div className="flex max-w-[46rem] flex-col gap-2.5">
        <Skeleton className="h-6 w-full" />
        <Skeleton className="h-6 w-3/5" />
      </div>
      <div className="h-[400px] rounded-bench border border-rule bg-sheet" />
      <RowsSkeleton rows={6} />
    </div>
  );
}

export function RowsSkeleton({ rows = 5 }: { rows?: number }) {
  return (
    <div
      className="flex flex-col gap-3 rounded-bench border border-rule bg-sheet p-4"
      role="status"
      aria-label="Loading"
    >
      {Array.from({ length: rows }, (_, index) => (
        <Skeleton key={index} className="h-5 w-full" />
      ))}
    </div>
  );
}
