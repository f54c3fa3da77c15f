import type { Area } from '../../shared/roles';
import { paths } from '../paths';

type Destination = { to: string; label: string; area: Area | null; isExact?: boolean };

/** The rail's groups, in the order of a working day. */
export const DESTINATIONS: readonly (readonly Destination[])[] = [
  [
    { to: paths.month(), label: 'This month', area: 'rates', isExact: true },
    { to: paths.comebacks(), label: 'Comebacks', area: 'comebacks' },
  ],
  [
    { to: paths.models(), label: 'Models', area: 'records' },
    { to: paths.parts(), label: 'Parts', area: 'analysis' },
    { to: paths.cascades(), label: 'Cascades', area: 'analysis' },
    { to: paths.repairs(), label: 'Repairs', area: 'records' },
  ],
  [
    { to: paths.imports(), label: 'Imports', area: 'imports' },
    { to: paths.help(), label: 'Help', area: null },
    { to: '/settings', label: 'Settings', area: null },
  ],
];

/** Within reach of a thumb, as far as the role may read them. */
export const AT_HAND: readonly string[] = [paths.month(), paths.comebacks(), paths.parts(), paths.repairs()];
