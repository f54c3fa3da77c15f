/** Every address in the client is built here. */
import type { HelpAnchor } from './help-anchors';

type Query = Record<string, string | number | boolean | null | undefined>;

function withQuery(path: string, query: Query = {}): string {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) {
    if (value !== undefined && value !== null && value !== '') search.set(name, String(value));
  }
  const text = search.toString();
  return text ? `${path}?${text}` : path;
}

const segment = encodeURIComponent;

export const SETTINGS_SECTIONS = [
  'you',
  'shop',
  'people',
  'technicians',
  'families',
  'keys',
  'mail',
  'audit',
] as const;
export type SettingsSection = (typeof SETTINGS_SECTIONS)[number];

export const paths = {
  signIn: (next?: string) => withQuery('/sign-in', { next: next === '/' ? undefined : next }),
  forgot: () => '/forgot',
  month: (query: { month?: string | undefined } = {}) => withQuery('/', query),
  comebacks: (query: Query = {}) => withQuery('/comebacks', query),
  models: (query: Query = {}) => withQuery('/models', query),
  model: (id: string) => `/models/${segment(id)}`,
  parts: (query: Query = {}) => withQuery('/parts', query),
  /** A component; the query carries model or family, clock, and what is compared. */
  part: (componentId: string, query: Query = {}) => withQuery(`/parts/${segment(componentId)}`, query),
  cascades: (query: Query = {}) => withQuery('/cascades', query),
  cascade: (id: string) => `/cascades/${segment(id)}`,
  repairs: (query: Query = {}) => withQuery('/repairs', query),
  repair: (id: string) => `/repairs/${segment(id)}`,
  unit: (id: string) => `/units/${segment(id)}`,
  imports: () => '/imports',
  import: (id: string) => `/imports/${segment(id)}`,
  settings: (section: SettingsSection = 'you') => `/settings/${section}`,
  help: (anchor?: HelpAnchor) => (anchor ? `/help#${anchor}` : '/help'),
};

/** A path to return to after sign-in: only one of this application, never an address elsewhere. */
export function safeNext(next: string | null): string {
  return next && next.startsWith('/') && !next.startsWith('//') && !next.includes('\\') ? next : '/';
}
