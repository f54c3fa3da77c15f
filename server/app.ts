import compression from 'compression';
import cookieParser from 'cookie-parser';
import express from 'express';
import helmet from 'helmet';
import { existsSync } from 'node:fs';
import path from 'node:path';
import { pinoHttp } from 'pino-http';
import type { Deps } from './deps';
import { authenticate, refuseForeignOrigin } from './http/authenticate';
import { AppError } from './http/errors';
import { problemHandler } from './http/problem';
import { mountRoutes } from './http/route';
import { allRoutes } from './resources/index';
import { docsPage } from './resources/openapi/routes';

const CLIENT = path.resolve(import.meta.dirname, '../dist/client');

/** The web application, made from its dependencies; it opens nothing and listens nowhere. */
export function createApp(deps: Deps): express.Express {
  const app = express();
  app.disable('x-powered-by');
  if (deps.config.trustProxy) app.set('trust proxy', deps.config.trustProxy);
  app.use(
    pinoHttp({
      logger: deps.logger,
      autoLogging: { ignore: (request) => !request.url?.startsWith('/api') },
      customLogLevel: (_request, response, error) =>
        error || response.statusCode >= 500 ? 'error' : 'debug',
      serializers: {
        req: ({ id, method, url }: { id: string; method: string; url: string }) => ({
          id,
          method,
          url: url.split('?')[0],
        }),
        res: ({ statusCode }: { statusCode: number }) => ({ statusCode }),
      },
    }),
    helmet({
      contentSecurityPolicy: {
        directives: {
          'default-src': ["'self'"],
          'img-src': ["'self'", 'data:', 'blob:'],
          'style-src': ["'self'", "'unsafe-inline'"],
          'upgrade-insecure-requests': deps.config.isHttps ? [] : null,
        },
      },
      strictTransportSecurity: deps.config.isHttps,
    }),
    compression(),
  );

  app.get('/healthz', (_request, response) => void response.json({ status: 'ok' }));
  app.get('/readyz', async (_request, response) => {
    await deps.database.$client.query('SELECT 1');
    response.json({ status: 'ready' });
  });
  app.use('/api', (_request, response, next) => {
    response.set('Cache-Control', 'no-store');
    next();
  });
  const api = express.Router();
  // The batch route takes bodies up to 32 MB; every other body is small.
  api.use('/repairs/batch', express.json({ limit: '32mb' }));
  api.use(express.json({ limit: '1mb' }), cookieParser(), refuseForeignOrigin(deps), authenticate(deps));
  const routes = allRoutes(deps);
  mountRoutes(api, routes);
  app.use('/api/v1', api);
  app.get('/api/docs', docsPage(routes));
  app.use('/api', () => {
    throw new AppError('missing', 'There is no such address in this API.');
  });

  app.use(
    '/assets',
    express.static(path.join(CLIENT, 'assets'), { immutable: true, maxAge: '1y', fallthrough: false }),
  );
  app.use(express.static(CLIENT, { index: false, maxAge: 0 }));
  app.get('/{*any}', (_request, response) => {
    const page = path.join(CLIENT, 'index.html');
    if (!existsSync(page)) throw new AppError('missing', 'The client has not been built yet.');
    response.set('Cache-Control', 'no-cache').sendFile(page);
  });
  app.use(problemHandler(deps.logger));
  return app;
}
