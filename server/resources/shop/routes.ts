import { changeShopSettings, shopSettings } from '../../../shared/administration';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { changeSettings, readSettings } from './service';

/** The settings of the shop; what everybody needs of them is in the session. */
export function shopRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/shop',
      tag: 'shop',
      summary: 'The settings of this shop',
      access: { area: 'administration', verb: 'read' },
      answer: shopSettings,
      handle: ({ actor }) => readSettings(deps, actor),
    }),
    route({
      method: 'patch',
      path: '/shop',
      tag: 'shop',
      summary: 'Change the settings of this shop',
      access: { area: 'administration', verb: 'write' },
      body: changeShopSettings,
      answer: shopSettings,
      handle: ({ actor, body }) => changeSettings(deps, actor, body),
    }),
  ];
}
