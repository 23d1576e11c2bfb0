import { join } from 'node:path';

import compression from 'compression';
import express, { type Express } from 'express';
import { pinoHttp } from 'pino-http';

import type { Dependencies } from './dependencies.ts';
import { errorHandler } from './http/error-handler.ts';
import { requireOwnOrigin, securityHeaders } from './http/guards.ts';
import { assignRequestId, mountRoutes } from './http/mount.ts';
import { problems } from './http/problems.ts';
import { apiRoutes } from './routes.ts';

/** Builds the application. It does not listen: the server and the tests do. */
export function createApp(deps: Dependencies): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', deps.config.trustProxy);
  app.set('etag', false);

  app.use(assignRequestId);
  app.use(
    pinoHttp({
      logger: deps.logger,
      genReqId: (_request, response) =>
        String((response as unknown as { locals: { requestId: string } }).locals.requestId),
      customLogLevel: (_request, response, error) =>
        error || response.statusCode >= 500 ? 'error' : 'debug',
    }),
  );
  app.use(securityHeaders(deps.config));
  app.use(compression());

  app.use('/api', requireOwnOrigin(deps.config));
  app.use('/api', mountRoutes(apiRoutes(), deps));
  app.use('/api', () => {
    throw problems.notFound('address', 'of the API');
  });

  serveClient(app, deps.config.webRoot);
  app.use(errorHandler(deps.logger));
  return app;
}

/** Hashed assets for a year; every other address is a page of the client. */
function serveClient(app: Express, webRoot: string): void {
  app.use(
    '/assets',
    express.static(join(webRoot, 'assets'), {
      index: false,
      maxAge: '1y',
      immutable: true,
      fallthrough: false,
    }),
  );
  app.use(express.static(webRoot, { index: false, maxAge: 0 }));
  app.get('/{*path}', (_request, response) => {
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile(join(webRoot, 'index.html'));
  });
}
