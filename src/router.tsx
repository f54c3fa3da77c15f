import { createBrowserRouter, type RouteObject } from 'react-router';
import { RouteError } from './components/ui/error-panel';
import { lazyPage } from './lib/lazy-page';
import { NotFound } from './shell/not-found';
import { loadSession } from './shell/load-session';
import { Shell } from './shell/shell';
import { ShellError } from './shell/shell-error';
import { ShellSkeleton } from './shell/shell-skeleton';

/** One line a screen; each is a chunk of its own. */
const screens: RouteObject[] = [
  { index: true, lazy: () => lazyPage(() => import('./pages/month')) },
  { path: 'comebacks', lazy: () => lazyPage(() => import('./pages/comebacks')) },
  { path: 'models', lazy: () => lazyPage(() => import('./pages/models')) },
  { path: 'models/:id', lazy: () => lazyPage(() => import('./pages/model')) },
  { path: 'parts', lazy: () => lazyPage(() => import('./pages/parts')) },
  { path: 'parts/:component', lazy: () => lazyPage(() => import('./pages/part')) },
  { path: 'cascades', lazy: () => lazyPage(() => import('./pages/cascades')) },
  { path: 'cascades/:id', lazy: () => lazyPage(() => import('./pages/cascade')) },
  { path: 'repairs', lazy: () => lazyPage(() => import('./pages/repairs')) },
  { path: 'repairs/:id', lazy: () => lazyPage(() => import('./pages/repair')) },
  { path: 'units/:id', lazy: () => lazyPage(() => import('./pages/unit')) },
  { path: 'imports', lazy: () => lazyPage(() => import('./pages/imports')) },
  { path: 'imports/:id', lazy: () => lazyPage(() => import('./pages/import')) },
  { path: 'settings/:section?', lazy: () => lazyPage(() => import('./pages/settings')) },
  { path: 'help', lazy: () => lazyPage(() => import('./pages/help')) },
  { path: '*', Component: NotFound },
];

export const routes: RouteObject[] = [
  {
    path: '/sign-in',
    lazy: () => lazyPage(() => import('./pages/sign-in')),
    HydrateFallback: () => null,
  },
  { path: '/forgot', lazy: () => lazyPage(() => import('./pages/forgot')), HydrateFallback: () => null },
  {
    path: '/set-password',
    lazy: () => lazyPage(() => import('./pages/set-password')),
    HydrateFallback: () => null,
  },
  {
    path: '/',
    Component: Shell,
    loader: loadSession,
    HydrateFallback: ShellSkeleton,
    ErrorBoundary: ShellError,
    // A page's failure stays inside the shell.
    children: [{ ErrorBoundary: RouteError, children: screens }],
  },
];

export const createRouter = () => createBrowserRouter(routes);
