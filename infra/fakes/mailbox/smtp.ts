import { type Socket } from 'node:net';
import { setTimeout as wait } from 'node:timers/promises';
import { SMTPServer, type SMTPServerDataStream, type SMTPServerSession } from 'smtp-server';
import { portFrom } from '../../process/ports';
import { type Letters } from './letters';

/** How the next mails are treated; tests set it to see what a sender does. */
export type Mode = 'normal' | 'drop-after-data' | 'reject-4xx' | 'reject-5xx' | 'slow';
export const modes: readonly Mode[] = [
  'normal',
  'drop-after-data',
  'reject-4xx',
  'reject-5xx',
  'slow',
];

export class Behaviour {
  private mode: Mode = 'normal';
  private left = Infinity;
  private to: string | undefined;

  /** `times`: for so many mails, then normal again. `to`: only for mails to this address. */
  set(mode: Mode, times = Infinity, to?: string): void {
    this.mode = mode;
    this.left = times;
    this.to = to?.toLowerCase();
  }

  get current(): Mode {
    return this.mode;
  }

  forMail(recipients: readonly string[]): Mode {
    if (this.mode === 'normal') return 'normal';
    if (this.to && !recipients.some((one) => one.toLowerCase() === this.to)) return 'normal';
    this.left -= 1;
    const mode = this.mode;
    if (this.left <= 0) this.set('normal');
    return mode;
  }
}

function refusal(code: number, words: string): Error {
  return Object.assign(new Error(words), { responseCode: code });
}

async function content(stream: SMTPServerDataStream): Promise<Buffer> {
  const chunks: Buffer[] = [];
  for await (const chunk of stream) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks);
}

export interface Smtp {
  port: number;
  close(): Promise<void>;
}

export async function startSmtp(
  letters: Letters,
  behaviour: Behaviour,
  wantedPort: number,
): Promise<Smtp> {
  // smtp-server does not hand out its connections, and a lost answer is a connection cut by us.
  const sockets = new Map<string, Socket>();

  async function receive(stream: SMTPServerDataStream, session: SMTPServerSession): Promise<void> {
    const raw = await content(stream);
    const { mailFrom, rcptTo } = session.envelope;
    const to = rcptTo.map(({ address }) => address);
    const mode = behaviour.forMail(to);
    if (mode === 'reject-4xx') throw refusal(451, 'The mailbox is busy, try again later');
    if (mode === 'reject-5xx') throw refusal(550, 'The mailbox does not take this mail');
    if (mode === 'slow') await wait(3_000);
    const answered = mode !== 'drop-after-data';
    await letters.add(raw, { from: mailFrom ? mailFrom.address : '', to }, answered);
    if (!answered) {
      sockets.get(addressKey(session.remoteAddress, session.remotePort))?.destroy();
      throw refusal(451, 'Cut');
    }
  }

  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    disableReverseLookup: true,
    logger: false,
    onAuth: (auth, _session, done) => done(null, { user: auth.username ?? 'anybody' }),
    onData: (stream, session, done) => {
      receive(stream, session).then(
        () => done(),
        (error: Error) => done(error),
      );
    },
  });
  server.on('error', () => undefined);
  server.server.on('connection', (socket: Socket) => {
    const key = addressKey(socket.remoteAddress ?? '', socket.remotePort ?? 0);
    sockets.set(key, socket);
    socket.once('close', () => sockets.delete(key));
  });
  const port = wantedPort ? await portFrom(wantedPort) : 0;
  await new Promise<void>((resolve) => server.listen(port, '127.0.0.1', resolve));
  const address = server.server.address();
  return {
    port: typeof address === 'object' && address ? address.port : port,
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        for (const socket of sockets.values()) socket.destroy();
      }),
  };
}

function addressKey(address: string, port: number): string {
  return `${address}|${port}`;
}
