import type { Logger } from 'pino';
import type { Config } from './config';
import type { Database } from './db/client';
import type { JobSender } from './jobs/sender';

/** What the application is made from; nothing in it is global. */
export type Deps = {
  config: Config;
  database: Database;
  jobs: JobSender;
  logger: Logger;
  /** The one clock of the service; computations take their `asOf` from it or from the request. */
  now: () => Date;
  sessionSecret: string;
};
