import { askReset, setPassword } from '../../../shared/session';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { clearSessionCookie } from '../../http/session-token';
import { sendReset, setPasswordByLink } from './service';

/** A new password, by a link that is mailed. */
export function passwordRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'post',
      path: '/password/forgot',
      tag: 'session',
      summary: 'Ask for a mail with a link to choose a new password',
      access: 'public',
      body: askReset,
      // The answer comes before the look-up: it and the time it takes are the same for every address.
      handle: async ({ body }) => {
        setImmediate(() => {
          sendReset(deps, body.email).catch((error: unknown) =>
            deps.logger.error({ err: error }, 'a reset could not be queued'),
          );
        });
      },
    }),
    route({
      method: 'post',
      path: '/password/set',
      tag: 'session',
      summary: 'Choose a password by a mailed link; signs out everywhere',
      access: 'public',
      body: setPassword,
      handle: async ({ body, response }) => {
        await setPasswordByLink(deps, body);
        clearSessionCookie(response, deps.config);
      },
    }),
  ];
}
