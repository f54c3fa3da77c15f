/** The roles a person can have in a shop, and what a program's key may be for. */
export const ROLES = ['owner', 'service_manager', 'technician', 'counter', 'accountant'] as const;
export type Role = (typeof ROLES)[number];
export const KEY_SCOPES = ['read', 'import'] as const;
export type KeyScope = (typeof KEY_SCOPES)[number];

export const ROLE_NAMES: Record<Role, string> = {
  owner: 'owner',
  service_manager: 'service manager',
  technician: 'technician',
  counter: 'counter',
  accountant: 'accountant',
};

/** What there is to be allowed: the rows of the matrix. */
export const AREAS = [
  'records',
  'visits',
  'analysis',
  'lookup',
  'comebacks',
  'rates',
  'technicianRates',
  'imports',
  'dictionary',
  'claims',
  'credits',
  'season',
  'administration',
] as const;
export type Area = (typeof AREAS)[number];

/** `own`: read, narrowed to the person's own repairs. */
export type Permission = 'rw' | 'r' | 'own' | '-';
export type Grantee = Role | `key:${KeyScope}`;

const GRANTEES = [
  'owner',
  'service_manager',
  'technician',
  'counter',
  'accountant',
  'key:read',
  'key:import',
] as const satisfies readonly Grantee[];

const matrix: Record<
  Area,
  readonly [Permission, Permission, Permission, Permission, Permission, Permission, Permission]
> = {
  //                 owner manager tech  counter books key:read key:import
  records: /*         */ ['rw', 'rw', 'r', 'r', 'r', 'r', '-'],
  visits: /*          */ ['rw', 'rw', 'rw', '-', '-', '-', '-'],
  analysis: /*        */ ['r', 'r', 'r', '-', 'r', 'r', '-'],
  lookup: /*          */ ['rw', 'rw', 'rw', 'rw', '-', '-', '-'],
  comebacks: /*       */ ['rw', 'rw', 'own', '-', 'r', 'r', '-'],
  rates: /*           */ ['r', 'r', 'r', '-', 'r', 'r', '-'],
  technicianRates: /* */ ['r', 'r', 'own', '-', '-', '-', '-'],
  imports: /*         */ ['rw', 'rw', '-', '-', 'r', 'r', 'rw'],
  dictionary: /*      */ ['rw', 'rw', 'r', '-', 'r', '-', '-'],
  claims: /*          */ ['rw', 'rw', '-', '-', 'r', '-', '-'],
  credits: /*         */ ['rw', 'r', '-', '-', 'rw', '-', '-'],
  season: /*          */ ['rw', 'rw', 'r', '-', 'r', 'r', '-'],
  administration: /*  */ ['rw', '-', '-', '-', '-', '-', '-'],
};

/** Who may what: the one table that the server enforces and the client shows itself by. */
export function permissionOf(grantee: Grantee, area: Area): Permission {
  return matrix[area][GRANTEES.indexOf(grantee)] ?? '-';
}

export function mayRead(grantee: Grantee, area: Area): boolean {
  return permissionOf(grantee, area) !== '-';
}

export function mayWrite(grantee: Grantee, area: Area): boolean {
  return permissionOf(grantee, area) === 'rw';
}
