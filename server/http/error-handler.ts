import { DriverException, ConnectionException } from '@mikro-orm/core';
import type { ErrorRequestHandler, Response } from 'express';
import type { Logger } from 'pino';

import { ProblemError, problems } from './problems.ts';

/** Sends any error as problem details. What is not a known problem is logged and told as `internal`. */
export function errorHandler(logger: Logger): ErrorRequestHandler {
  return (error: unknown, request, response, next) => {
    const instance = `urn:uuid:${requestIdOf(response)}`;
    const problem = toProblemError(error);
    if (problem.status >= 500) {
      logger.error({ err: error, instance, method: request.method, path: request.path }, 'request failed');
    }
    if (response.headersSent) {
      next(error);
      return;
    }
    try {
      sendProblem(response, problem, instance);
    } catch (failure) {
      logger.error({ err: failure, instance }, 'the error handler itself failed');
      response.status(500).end();
    }
  };
}

function requestIdOf(response: Response): string {
  const id: unknown = response.locals['requestId'];
  return typeof id === 'string' ? id : 'unknown';
}

function sendProblem(response: Response, problem: ProblemError, instance: string): void {
  const body = problem.toProblem(instance);
  if (body.retryAfterSeconds !== undefined) response.setHeader('Retry-After', String(body.retryAfterSeconds));
  response
    .status(body.status)
    .setHeader('Content-Type', 'application/problem+json; charset=utf-8')
    .end(JSON.stringify(body));
}

/** Errors of the libraries in front of the handlers, by the `type` that body-parser gives them. */
const BODY_PROBLEMS: Readonly<Record<string, (error: { limit?: number }) => ProblemError>> = {
  'entity.too.large': (error) => problems.payloadTooLarge(`${Math.round((error.limit ?? 0) / 1024)} kB`),
  'entity.parse.failed': () => problems.malformedRequest('The body is not valid JSON.'),
  'encoding.unsupported': () => problems.malformedRequest('The encoding of the body is not supported.'),
  'charset.unsupported': () => problems.malformedRequest('The character set of the body is not supported.'),
  'request.aborted': () => problems.malformedRequest('The request was cut off.'),
  'request.size.invalid': () => problems.malformedRequest('The body has another length than announced.'),
};

function toProblemError(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  if (error instanceof ConnectionException) return problems.unavailable();
  if (error instanceof DriverException) return problems.internal();
  if (typeof error === 'object' && error !== null) {
    const { type, status } = error as { type?: unknown; status?: unknown };
    const known = typeof type === 'string' ? BODY_PROBLEMS[type] : undefined;
    if (known) return known(error);
    if (status === 400) return problems.malformedRequest('The request cannot be read.');
  }
  return problems.internal();
}
