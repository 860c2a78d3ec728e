import { defineOperations, type Operation } from '@lib/contracts';
import express, { type ErrorRequestHandler } from 'express';
import request from 'supertest';
import { z } from 'zod';
import { Problem } from '../problems/problem';
import { readBody } from './body';
import { parseRequest } from './parse';

const shape = {
  method: 'POST',
  path: '/api/things',
  summary: 'A thing',
  permission: 'signed-in',
} as const;
const { optional, required } = defineOperations({
  optional: { ...shape, body: z.strictObject({ note: z.string().default('') }) },
  required: { ...shape, body: z.strictObject({ name: z.string() }) },
});

describe('a body', () => {
  const problemAnswer: ErrorRequestHandler = (error, _request, response, _next) => {
    const status = error instanceof Problem ? error.status : 500;
    response.status(status).json(error instanceof Problem ? error.errors : String(error));
  };
  const served = (operation: Operation) =>
    request(
      express()
        .post('/', ...readBody(operation), (asked, response) => {
          response.json(parseRequest(operation, asked).body);
        })
        .use(problemAnswer),
    ).post('/');

  it('may be missing where every field may', async () => {
    const missing = await served(optional);
    expect([missing.status, missing.body]).toEqual([200, { note: '' }]);
    // As a browser asks: fetch sends the length of nothing.
    const empty = await served(optional).set('Content-Length', '0');
    expect([empty.status, empty.body]).toEqual([200, { note: '' }]);
    expect((await served(optional).send({ note: 'hello' })).body).toEqual({ note: 'hello' });
  });

  it('that is missing names the fields it lacks', async () => {
    const missing = await served(required);
    expect(missing.status).toBe(422);
    expect(missing.body).toEqual([expect.objectContaining({ pointer: '/name' })]);
  });

  it('of another kind is refused', async () => {
    const form = await served(optional).type('text/plain').send('note=hello');
    expect(form.status).toBe(415);
  });
});
