import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import { type AddressInfo } from 'node:net';
import { portFrom } from '../process/ports';

/** What the two fakes need of a web server, and no more. */
export interface Answer {
  status?: number;
  headers?: Record<string, string>;
  body?: string | Buffer;
}

export interface Listening {
  url: string;
  port: number;
  close(): Promise<void>;
}

export async function readBody(request: IncomingMessage): Promise<string> {
  const chunks: Buffer[] = [];
  for await (const chunk of request) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks).toString('utf8');
}

export function json(value: unknown, status = 200): Answer {
  return {
    status,
    headers: { 'content-type': 'application/json; charset=utf-8' },
    body: JSON.stringify(value, null, 2),
  };
}

export function html(body: string, status = 200, headers: Record<string, string> = {}): Answer {
  return {
    status,
    headers: {
      'content-type': 'text/html; charset=utf-8',
      'content-security-policy':
        "default-src 'none'; style-src 'unsafe-inline'; img-src data: 'self'; frame-src 'self'; " +
        "base-uri 'none'",
      'cache-control': 'no-store',
      ...headers,
    },
    body,
  };
}

export function escapeHtml(text: string): string {
  const names: Record<string, string> = {
    '&': '&amp;',
    '<': '&lt;',
    '>': '&gt;',
    '"': '&quot;',
    "'": '&#39;',
  };
  return text.replace(/[&<>"']/g, (sign) => names[sign] ?? sign);
}

export function send(response: ServerResponse, answer: Answer): void {
  response.writeHead(answer.status ?? 200, answer.headers);
  response.end(answer.body);
}

export type Handler = (request: IncomingMessage, response: ServerResponse) => Promise<void>;

function listen(server: Server, port: number, host: string): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, host, () => {
      server.off('error', reject);
      resolve();
    });
  });
}

/** Listens on loopback, on the wanted port or the next free one; 0 takes any. */
export async function serve(handler: Handler, wantedPort: number): Promise<Listening> {
  const server = createServer((request, response) => {
    handler(request, response).catch((error: unknown) => {
      if (!response.headersSent) response.writeHead(500, { 'content-type': 'text/plain' });
      response.end(String(error instanceof Error ? error.stack : error));
    });
  });
  await listen(server, wantedPort ? await portFrom(wantedPort) : 0, '127.0.0.1');
  const { port } = server.address() as AddressInfo;
  return {
    port,
    url: `http://127.0.0.1:${port}`,
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}
