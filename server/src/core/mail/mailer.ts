import MailComposer from 'nodemailer/lib/mail-composer';
import SMTPConnection from 'nodemailer/lib/smtp-connection';

export interface Mail {
  to: { name: string; address: string };
  subject: string;
  text: string;
  html: string;
  /** Made from what the mail is about, so that the same mail always has the same id. */
  messageId: string;
  fromName?: string;
  replyTo?: string | null;
  headers?: Record<string, string>;
  attachments?: { filename: string; content: Buffer; contentType: string }[];
}

/**
 * How handing a mail over ended. `uncertain`: the server got the mail but its answer was lost, so
 * only a person can tell; it is never sent again by itself.
 */
export type HandedOver =
  { outcome: 'sent' } | { outcome: 'retry' | 'failed' | 'uncertain'; error: string };

export interface MailSession {
  handOver(mail: Mail): Promise<HandedOver>;
  close(): void;
}

type SmtpError = Error & { responseCode?: number };

/** A conversation with the mail server that carries several mails, opened again when it broke. */
export function mailSession(options: { smtpUrl: string; from: string }): MailSession {
  let connection: SMTPConnection | undefined;
  const fromAddress = /<(.+)>/.exec(options.from)?.[1] ?? options.from;
  const fromName = options.from.replace(/\s*<.*/, '');

  async function handOver(mail: Mail): Promise<HandedOver> {
    const message = await compose(mail, { name: mail.fromName ?? fromName, address: fromAddress });
    if (!connection) {
      try {
        const opened = await connect(options.smtpUrl);
        // A server may hang up between two mails; the next one then takes a new connection, instead
        // of finding out in the middle of its own conversation.
        opened.once('end', () => {
          if (connection === opened) close();
        });
        connection = opened;
      } catch (error) {
        return { outcome: 'retry', error: describe(error) };
      }
    }
    const open = connection;
    const error = await new Promise<SmtpError | undefined>((resolve) => {
      // A connection that breaks reports it as an event; only the first answer counts, and giving the
      // connection up makes events of its own.
      const stop = (found?: SmtpError) => {
        open.off('error', stop);
        open.off('end', hungUp);
        resolve(found);
      };
      const hungUp = () => stop(new Error('The mail server hung up'));
      open.once('error', stop);
      open.once('end', hungUp);
      open.send({ from: fromAddress, to: [mail.to.address] }, message, (refused) =>
        stop(refused ?? undefined),
      );
    });
    return error ? ended(error) : { outcome: 'sent' };
  }

  function ended(error: SmtpError): HandedOver {
    close();
    const code = error.responseCode ?? 0;
    if (code >= 500) return { outcome: 'failed', error: describe(error) };
    if (code >= 400) return { outcome: 'retry', error: describe(error) };
    return { outcome: 'uncertain', error: describe(error) };
  }

  function close(): void {
    connection?.removeAllListeners('error');
    // A late error of a connection we gave up must not end the process.
    connection?.on('error', () => undefined);
    connection?.close();
    connection = undefined;
  }

  return { handOver, close };
}

function connect(smtpUrl: string): Promise<SMTPConnection> {
  const url = new URL(smtpUrl);
  const secure = url.protocol === 'smtps:';
  const connection = new SMTPConnection({
    host: url.hostname,
    port: Number(url.port) || (secure ? 465 : 587),
    secure,
    connectionTimeout: 10_000,
    greetingTimeout: 10_000,
    socketTimeout: 60_000,
    // A server on this machine has no certificate; any other must have one.
    ignoreTLS: url.hostname === '127.0.0.1' || url.hostname === 'localhost',
    requireTLS: !secure && url.hostname !== '127.0.0.1' && url.hostname !== 'localhost',
  });
  return new Promise((resolve, reject) => {
    const fail = (error: Error) => {
      connection.close();
      reject(error);
    };
    connection.once('error', fail);
    connection.connect(() => {
      const ready = () => {
        connection.off('error', fail);
        resolve(connection);
      };
      if (!url.username) return ready();
      const credentials = {
        user: decodeURIComponent(url.username),
        pass: decodeURIComponent(url.password),
      };
      connection.login({ credentials }, (error) => (error ? fail(error) : ready()));
    });
  });
}

function compose(mail: Mail, from: { name: string; address: string }): Promise<Buffer> {
  return new MailComposer({
    from,
    to: mail.to,
    replyTo: mail.replyTo ?? undefined,
    subject: mail.subject,
    text: mail.text,
    html: mail.html,
    messageId: mail.messageId,
    headers: { 'Auto-Submitted': 'auto-generated', ...mail.headers },
    attachments: mail.attachments,
  })
    .compile()
    .build();
}

function describe(error: unknown): string {
  return (error instanceof Error ? error.message : String(error)).slice(0, 300);
}
