import type { Actor } from './actor';

declare global {
  // Express is extended by merging into its namespace.
  namespace Express {
    interface Request {
      actor?: Actor;
    }
  }
}
