import { Suspense, useEffect, useRef } from 'react';
import { Link, Outlet, ScrollRestoration, useLocation, useNavigation } from 'react-router';
import { Mark } from '../components/ui/icons';
import { PageSkeleton } from '../components/ui/skeleton';
import { ToastRegion } from '../components/ui/toast-region';
import { useSession } from '../lib/session';
import { paths } from '../paths';
import { BottomBar } from './bottom-bar';
import { Drawer } from './drawer';
import { FindRepair } from './find-repair';
import { RailLinks } from './rail-links';
import { Who } from './who';

/** The frame around every screen: a rail at the desk, two bars on a phone. */
export function Shell() {
  const { shop } = useSession();
  const isUnderWay = useNavigation().state !== 'idle';
  const main = useFocusOnArrival();
  return (
    <div className="min-h-screen items-start desk:grid desk:grid-cols-[196px_minmax(0,1fr)] print:block">
      <a
        href="#content"
        className="absolute top-2 left-2 z-50 -translate-y-20 rounded-bench bg-layout px-4 py-2 text-on-layout focus:translate-y-0"
        onClick={(event) => {
          event.preventDefault();
          main.current?.focus();
        }}
      >
        Skip to the page
      </a>
      <header
        data-screen-only
        className="sticky top-0 hidden h-screen flex-col gap-4 overflow-y-auto border-r border-rule pt-5 pb-4 desk:flex"
      >
        <Link to={paths.month()} className="flex items-center gap-2 px-5 font-strong text-ink no-underline">
          <Mark />
          Witness Mark
        </Link>
        <div className="px-4">
          <FindRepair hasShortcut />
        </div>
        <RailLinks />
        <div className="mt-auto px-5 pt-3">
          <Who />
        </div>
      </header>
      <header
        data-screen-only
        className="sticky top-0 z-30 flex h-14 items-center justify-between border-b border-rule bg-paper pr-1.5 pl-4 desk:hidden"
      >
        <Link to={paths.month()} className="flex items-center gap-2 font-strong text-ink no-underline">
          <Mark />
          {shop.name}
        </Link>
        <Drawer />
      </header>
      <div
        aria-hidden="true"
        className={`fixed inset-x-0 top-0 z-50 h-0.5 origin-left bg-layout transition-transform delay-150 duration-700 ${isUnderWay ? 'scale-x-75' : 'scale-x-0'}`}
      />
      <main
        ref={main}
        id="content"
        tabIndex={-1}
        aria-busy={isUnderWay}
        className="min-w-0 max-w-[1280px] px-4 pt-5 pb-24 outline-none desk:px-9 desk:pt-6 desk:pb-10 print:p-0"
      >
        <Suspense fallback={<PageSkeleton />}>
          <Outlet />
        </Suspense>
      </main>
      <BottomBar />
      <ToastRegion />
      <ScrollRestoration />
    </div>
  );
}

/** After going to another screen the focus is at its start, where a reader expects it. */
function useFocusOnArrival() {
  const { pathname, hash } = useLocation();
  const main = useRef<HTMLElement>(null);
  const arrivedAt = useRef(pathname);
  useEffect(() => {
    if (arrivedAt.current === pathname) return;
    arrivedAt.current = pathname;
    if (hash) return;
    const heading = main.current?.querySelector('h1');
    (heading ?? main.current)?.focus({ preventScroll: true });
  }, [pathname, hash]);
  return main;
}
