import { createApp } from '../../server/src/app';
import pino from 'pino';
import { api } from '../support/api';
import { startTestServer, type TestServer } from '../support/app';

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

interface Line {
  req?: { id: string; method: string };
  res?: { status: number };
  operation?: string;
}

describe('the log of requests', () => {
  it('names request, operation and how it ended, and neither address nor person', async () => {
    const lines: string[] = [];
    const log = pino({ level: 'info' }, { write: (line: string) => void lines.push(line) });
    const app = createApp(server.config, log);
    const visitor = api(app, undefined);
    const answer = await visitor.call('session.signIn', {
      body: { email: 'ada@pendle.example', password: 'seven wet mittens' },
    });
    await visitor.call('invitations.look', { params: { token: 'x'.repeat(43) } });

    const read = lines.map((line) => JSON.parse(line) as Line);
    expect(read.map(({ operation, res }) => [operation, res?.status])).toEqual([
      ['session.signIn', 401],
      ['invitations.look', 404],
    ]);
    expect(read[0]?.req?.id).toBe((answer.body as { requestId: string }).requestId);
    expect(lines.join('')).not.toMatch(/ada@pendle|seven wet|xxxx/);
  });
});
