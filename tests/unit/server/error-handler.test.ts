import { OptimisticLockError } from '@mikro-orm/core';
import type { Request, Response } from 'express';
import { describe, expect, it, vi } from 'vitest';

import { errorHandler } from '#server/http/error-handler.ts';
import { problems } from '#server/http/problems.ts';

const REQUEST = { method: 'GET', path: '/api/specs' } as Request;
const INSTANCE = 'urn:uuid:request-1';

/** A response that keeps what it is given, in the way Express chains. */
function aResponse({ headersSent = false, failing = false } = {}) {
  const sent: { status?: number; headers: Record<string, string>; body?: string | undefined } = {
    headers: {},
  };
  const response = {
    locals: { requestId: 'request-1' },
    headersSent,
    status(code: number) {
      sent.status = code;
      return response;
    },
    setHeader(name: string, value: string) {
      if (failing) throw new Error('cannot set a header');
      sent.headers[name] = value;
      return response;
    },
    removeHeader: () => undefined,
    end(body?: string) {
      sent.body = body;
      return response;
    },
  };
  return { response: response as unknown as Response, sent };
}

function handle(error: unknown, options: Parameters<typeof aResponse>[0] = {}, log = vi.fn()) {
  const { response, sent } = aResponse(options);
  const next = vi.fn();
  void errorHandler({ error: log })(error, REQUEST, response, next);
  const body = sent.body === undefined ? undefined : (JSON.parse(sent.body) as Record<string, unknown>);
  return { sent, body, log, next };
}

describe('the error handler', () => {
  it('sends a known problem as it is, and logs nothing', () => {
    const { sent, body, log } = handle(problems.notFound('spec', '42'));
    expect(sent.status).toBe(404);
    expect(sent.headers['Content-Type']).toBe('application/problem+json; charset=utf-8');
    expect(body).toEqual({
      type: '/problems/not-found',
      title: 'Not found',
      status: 404,
      detail: 'There is no such spec here.',
      instance: INSTANCE,
      name: 'not-found',
      resource: 'spec',
      id: '42',
    });
    expect(log).not.toHaveBeenCalled();
  });

  it('says when to try again', () => {
    const { sent, body } = handle(problems.tooManyRequests(37));
    expect(sent.headers['Retry-After']).toBe('37');
    expect(body).toMatchObject({ status: 429, retryAfterSeconds: 37 });
  });

  it('tells a stranger nothing of an unknown error, and logs it under the same instance', () => {
    const error = new Error('password of the database is hunter2');
    const { sent, body, log } = handle(error);
    expect(sent.status).toBe(500);
    expect(sent.body).not.toContain('hunter2');
    expect(body).toMatchObject({ name: 'internal', instance: INSTANCE });
    expect(log).toHaveBeenCalledWith(
      expect.objectContaining({ err: error, instance: INSTANCE }),
      'request failed',
    );
  });

  it.each([['a string'], [undefined], [null], [42], [Symbol('odd')], [Object.create(null)]])(
    'takes anything that may be thrown: %s',
    (thrown) => {
      expect(handle(thrown).sent.status).toBe(500);
    },
  );

  it('leaves an answer that has begun to Express, which cuts it off', () => {
    const error = new Error('late');
    const { sent, log, next } = handle(error, { headersSent: true });
    expect(next).toHaveBeenCalledWith(error);
    expect(sent.body).toBeUndefined();
    expect(log).toHaveBeenCalledOnce();
  });

  it('still answers when it fails itself', () => {
    const { response, sent } = aResponse({ failing: true });
    void errorHandler({ error: vi.fn() })(new Error('first'), REQUEST, response, vi.fn());
    expect(sent).toEqual({ status: 500, headers: {}, body: undefined });
  });

  it('still answers when the log fails', () => {
    const failingLog = vi.fn(() => {
      throw new Error('disk full');
    });
    expect(handle(new Error('first'), {}, failingLog).sent.status).toBe(500);
    expect(failingLog).toHaveBeenCalled();
  });

  it('still answers when the state of a stale edit cannot be written as JSON', () => {
    const circular: Record<string, unknown> = {};
    circular['self'] = circular;
    expect(handle(problems.staleVersion(3, circular)).sent.status).toBe(500);
  });

  it.each([
    ['a lock that was overtaken', new OptimisticLockError('stale', {}), 412],
    ['a refused connection', Object.assign(new Error('connect'), { code: 'ECONNREFUSED' }), 503],
    ['a value no column holds', Object.assign(new Error('bad'), { code: '22P02' }), 400],
    ['a file that is missing', Object.assign(new Error('no file'), { status: 404 }), 404],
    ['a path that cannot be decoded', Object.assign(new Error('%'), { status: 400 }), 400],
    ['a body cut off', Object.assign(new Error('aborted'), { type: 'request.aborted', status: 400 }), 400],
    ['a body too large', Object.assign(new Error('!'), { type: 'entity.too.large', limit: 1024 }), 413],
  ])('knows %s', (_title, error, status) => {
    expect(handle(error).sent.status).toBe(status);
  });

  it('logs a value that our checks let through and the database refused', () => {
    expect(handle(Object.assign(new Error('bad'), { code: '22021' })).log).toHaveBeenCalledOnce();
  });
});
