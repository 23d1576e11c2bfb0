import type { ServerResponse } from 'node:http';
import { join } from 'node:path';

import compression from 'compression';
import express, { type Express } from 'express';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';

import type { Dependencies } from './dependencies.ts';
import { errorHandler } from './http/error-handler.ts';
import { requireOwnOrigin, securityHeaders } from './http/guards.ts';
import { assignRequestId, mountRoutes } from './http/mount.ts';
import { problems } from './http/problems.ts';
import { apiRoutes } from './routes.ts';
import { PROJECT_ROOT } from './setup/paths.mjs';

/** Builds the application. It does not listen: the server and the tests do. */
export function createApp(deps: Dependencies): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', deps.config.trustProxy);
  app.set('etag', false);

  app.use(assignRequestId);
  app.use(logRequests(deps.logger));
  app.use(securityHeaders(deps.config));
  app.use(compression());

  app.use('/api', requireOwnOrigin(deps.config));
  app.use('/api', mountRoutes(apiRoutes(), deps));
  app.use('/api', () => {
    throw problems.notFound('address', 'of the API');
  });

  serveProblemPages(app);
  serveClient(app, deps.config.webRoot);
  app.use(errorHandler(deps.logger));
  return app;
}

/** A line for each request; a link into a team is a secret and does not stand in it. */
function logRequests(logger: Logger) {
  return pinoHttp({
    logger,
    genReqId: (_request, response) =>
      String((response as unknown as { locals: { requestId: string } }).locals.requestId),
    customLogLevel: (_request, response, error) => (error || response.statusCode >= 500 ? 'error' : 'debug'),
    serializers: {
      req: (request: { url: string }) => ({
        ...request,
        url: request.url.replace(/(\/invitations?\/)[^/?]+/, '$1…'),
      }),
    },
  });
}

/** What each problem means, at the address that its `type` gives. */
function serveProblemPages(app: Express): void {
  const folder = join(PROJECT_ROOT, 'docs/problems');
  const setHeaders = (response: ServerResponse): void => {
    response.setHeader('Content-Type', 'text/plain; charset=utf-8');
  };
  app.use('/problems', express.static(folder, { index: false, extensions: ['md'], setHeaders }));
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
    response.sendFile('index.html', { root: webRoot });
  });
}
