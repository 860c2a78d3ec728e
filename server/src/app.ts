import { randomUUID } from 'node:crypto';
import { openApiDocument, operations } from '@lib/contracts';
import express, { type Express } from 'express';
import passport from 'passport';
import { pinoHttp } from 'pino-http';
import { authenticate } from './core/auth/authenticate';
import { useAccessTokens } from './core/auth/access-token';
import { type Config } from './core/config';
import { readBody } from './core/http/body';
import { checkRoutes } from './core/http/check-routes';
import { health } from './core/http/health';
import { operationOf, serveMetrics, timeOperation } from './core/http/metrics';
import { problemHandler } from './core/http/problem-handler';
import { limitGuesses, limitRate, securityHeaders } from './core/http/security';
import { serveRoute } from './core/http/serve-route';
import { webFiles } from './core/http/web-files';
import { type Log, plainError } from './core/logging';
import { notFound } from './core/problems/problem';
import { stripeWebhook } from './features/payments/stripe-webhook';
import { routes } from './routes';

/** The web process's Express application: the API, the web files, and what watches over it. */
export function createApp(config: Config, log: Log): Express {
  checkRoutes(routes);
  useAccessTokens(config.sessionSecret);

  const app = express();
  app.disable('x-powered-by');
  app.set('etag', false);
  app.set('query parser', 'simple');
  if (config.trustProxy) app.set('trust proxy', config.trustProxy);

  app.use(health());
  app.use(
    pinoHttp({
      logger: log,
      genReqId: () => randomUUID(),
      // The path may hold ids and mailed tokens: the operation is logged instead of it.
      serializers: {
        req: (req: { id: unknown; method: string }) => ({ id: req.id, method: req.method }),
        res: (res: { statusCode: number }) => ({ status: res.statusCode }),
        err: plainError,
      },
      wrapSerializers: false,
      customProps: (_req, res) => ({ operation: operationOf(res) }),
      customLogLevel: (_req, res, error) => {
        if (error || res.statusCode >= 500) return 'error';
        return operationOf(res) ? 'info' : 'debug';
      },
    }),
  );
  app.use(securityHeaders());
  app.get('/metrics', serveMetrics());
  // Before the rate limit: it comes from few addresses, and its signature is its permission.
  app.post('/api/stripe/webhook', stripeWebhook(config, log));
  app.use('/api', limitRate(config.rateLimit), (_request, response, next) => {
    response.set('Cache-Control', 'no-store');
    next();
  });
  app.use(passport.initialize());

  const document = JSON.stringify(openApiDocument(operations, '1'));
  app.get('/api/openapi.json', (_request, response) => {
    response.type('application/json').send(document);
  });

  const signInLimit = limitGuesses(config.signInRateLimit);
  for (const route of routes) {
    const { operation } = route;
    const method = operation.method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete';
    app[method](
      operation.path,
      timeOperation(operation.id),
      ...(operation.permission === 'public' && operation.method === 'POST' && operation.body
        ? [signInLimit]
        : []),
      ...(operation.permission === 'public' ? [] : [authenticate]),
      ...readBody(operation),
      serveRoute(route),
    );
  }

  app.use('/api', (_request, _response, next) => next(notFound()));
  app.use(webFiles(config.webDir));
  app.use((_request, _response, next) => next(notFound()));
  app.use(problemHandler(log));
  return app;
}
