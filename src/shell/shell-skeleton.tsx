import { Mark } from '../components/ui/icons';
import { PageSkeleton } from '../components/ui/skeleton';

/** The frame in its real size, while the first answers are on their way. */
export function ShellSkeleton() {
  return (
    <div className="min-h-screen desk:grid desk:grid-cols-[196px_minmax(0,1fr)]">
      <div className="flex h-14 items-center gap-2 border-b border-rule px-4 font-strong desk:h-screen desk:items-start desk:border-r desk:border-b-0 desk:px-5 desk:pt-5">
        <Mark />
        Witness Mark
      </div>
      <main className="max-w-[1280px] px-4 py-5 desk:px-9 desk:py-6">
        <PageSkeleton />
      </main>
    </div>
  );
}
