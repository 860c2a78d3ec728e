import { type RequestHandler } from 'express';
import { Counter, Gauge, Histogram, collectDefaultMetrics, register } from 'prom-client';

/** For Prometheus. Labels are operation ids, never addresses: those hold ids of people's rows. */
export const metrics = {
  requestSeconds: new Histogram({
    name: 'tumblewright_request_seconds',
    help: 'How long an operation took to answer',
    labelNames: ['operation', 'status'],
    buckets: [0.005, 0.01, 0.025, 0.05, 0.1, 0.25, 0.5, 1, 2.5, 10],
  }),
  deliveries: new Counter({
    name: 'tumblewright_deliveries_total',
    help: 'Mails by how handing them over ended',
    labelNames: ['state'],
  }),
  waitingJobs: new Gauge({
    name: 'tumblewright_queue_waiting',
    help: 'Jobs waiting in a queue',
    labelNames: ['queue'],
  }),
};

let collecting = false;

export function serveMetrics(): RequestHandler {
  if (!collecting) collectDefaultMetrics();
  collecting = true;
  return async (_request, response) => {
    response.type(register.contentType).send(await register.metrics());
  };
}

/** Times one operation, and notes which one it is for the log. */
export function timeOperation(operation: string): RequestHandler {
  return (_request, response, next) => {
    response.locals.operation = operation;
    const stop = metrics.requestSeconds.startTimer({ operation });
    response.on('finish', () => stop({ status: response.statusCode }));
    next();
  };
}

/** The operation that an answer is of; undefined for files and what is not there. */
export function operationOf(response: object): string | undefined {
  const { locals } = response as { locals?: { operation?: string } };
  return locals?.operation;
}
