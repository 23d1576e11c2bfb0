import { OptimisticLockError } from '@mikro-orm/core';
import type { ErrorRequestHandler, Response } from 'express';
import type { Logger } from 'pino';

import { isDatabaseUnreachable, isValueRefused } from './database-faults.ts';
import { ProblemError, problems } from './problems.ts';

/** Sends any error as problem details. What is not a known problem is logged and told as `internal`. */
export function errorHandler(logger: Pick<Logger, 'error'>): ErrorRequestHandler {
  return (error: unknown, request, response, next) => {
    try {
      const instance = `urn:uuid:${requestIdOf(response)}`;
      const problem = toProblemError(error);
      if (isForTheLog(error, problem)) {
        logger.error({ err: error, instance, method: request.method, path: request.path }, 'request failed');
      }
      // Express then cuts the connection, so that half an answer is not taken for a whole one.
      if (response.headersSent) next(error);
      else sendProblem(response, problem, instance);
    } catch {
      if (response.headersSent) next(error);
      else response.status(500).end();
    }
  };
}

function requestIdOf(response: Response): string {
  const id: unknown = response.locals['requestId'];
  return typeof id === 'string' ? id : 'unknown';
}

/** Faults of ours, and values that our checks let through and the database did not. */
function isForTheLog(error: unknown, problem: ProblemError): boolean {
  return problem.status >= 500 || isValueRefused(error);
}

function sendProblem(response: Response, problem: ProblemError, instance: string): void {
  const body = JSON.stringify(problem.toProblem(instance));
  const { retryAfterSeconds } = problem.extra;
  if (retryAfterSeconds !== undefined) response.setHeader('Retry-After', String(retryAfterSeconds));
  response.removeHeader('ETag');
  response
    .status(problem.status)
    .setHeader('Cache-Control', 'no-store')
    .setHeader('Content-Type', 'application/problem+json; charset=utf-8')
    .end(body);
}

/** Errors of the libraries in front of the handlers, by the `type` that body-parser gives them. */
const BODY_PROBLEMS = new Map<string, (error: { limit?: number }) => ProblemError>([
  ['entity.too.large', (error) => problems.payloadTooLarge(`${Math.round((error.limit ?? 0) / 1024)} kB`)],
  ['entity.parse.failed', () => problems.malformedRequest('The body is not valid JSON.')],
  ['encoding.unsupported', () => problems.unsupportedMediaType('The encoding of the body is not supported.')],
  ['charset.unsupported', () => problems.unsupportedMediaType('The body must be in UTF-8.')],
  ['request.aborted', () => problems.malformedRequest('The request was cut off.')],
  ['request.size.invalid', () => problems.malformedRequest('The body has another length than announced.')],
]);

function toProblemError(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  if (error instanceof OptimisticLockError) return problems.savedMeanwhile();
  if (isDatabaseUnreachable(error)) return problems.unavailable();
  if (isValueRefused(error)) {
    return problems.malformedRequest('A value in this request is none that the database can hold.');
  }
  return toProblemOfLibrary(error) ?? problems.internal();
}

function toProblemOfLibrary(error: unknown): ProblemError | undefined {
  if (typeof error !== 'object' || error === null) return undefined;
  const { type, status } = error as { type?: unknown; status?: unknown };
  const known = typeof type === 'string' ? BODY_PROBLEMS.get(type) : undefined;
  if (known) return known(error);
  if (status === 404) return problems.notFound('address', 'on this server');
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return problems.malformedRequest('The request cannot be read.');
  }
  return undefined;
}
