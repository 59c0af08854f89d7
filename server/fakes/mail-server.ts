import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import { type AddressInfo } from 'node:net';
import { type AddressObject, simpleParser } from 'mailparser';
import { SMTPServer, type SMTPServerDataStream, type SMTPServerSession } from 'smtp-server';
import { Mailbox, type ReceivedMail } from './mailbox';

/** Where the mail fake listens and keeps what it receives. Port 0 takes any free one. */
export interface MailServerOptions {
  dir: string;
  smtpPort: number;
  mailboxPort: number;
}

/** A mail fake that listens. */
export interface RunningMailServer {
  smtpPort: number;
  mailboxPort: number;
  close(): Promise<void>;
}

const largestMailBytes = 10 * 1024 * 1024;

/**
 * Starts an SMTP server that delivers to nobody: every mail goes to one mailbox, served over HTTP on a second
 * port. `GET /` answers `{items: ReceivedMail[]}`, newest first, at most 200; `DELETE /` empties it.
 */
export async function startMailServer(options: MailServerOptions): Promise<RunningMailServer> {
  const mailbox = await Mailbox.open(options.dir);
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    disableReverseLookup: true,
    size: largestMailBytes,
    closeTimeout: 1_000,
    onData: (stream, session, done) => {
      receive(stream, session, mailbox).then(() => {
        done();
      }, done);
    },
  });
  const web = createServer((request, response) => {
    answer(request, response, mailbox).catch((error: unknown) => {
      response.destroy(error instanceof Error ? error : new Error(String(error)));
    });
  });
  await listen(web, options.mailboxPort);
  await new Promise<void>((resolve, reject) => {
    smtp.once('error', reject);
    smtp.listen(options.smtpPort, '127.0.0.1', () => {
      smtp.off('error', reject);
      // A client that hangs up in the middle of a mail is the client's affair: it will send it again.
      smtp.on('error', (error) => {
        process.stderr.write(`SMTP connection failed: ${error.message}\n`);
      });
      resolve();
    });
  });
  return {
    smtpPort: portOf(smtp.server.address()),
    mailboxPort: portOf(web.address()),
    close: async () => {
      web.closeAllConnections();
      await Promise.all([
        new Promise((resolve) => web.close(resolve)),
        new Promise<void>((resolve) => {
          smtp.close(resolve);
        }),
      ]);
    },
  };
}

async function receive(
  stream: SMTPServerDataStream,
  session: SMTPServerSession,
  mailbox: Mailbox,
): Promise<void> {
  const parsed = await simpleParser(stream);
  if (stream.sizeExceeded) {
    throw Object.assign(new Error(`Mails may have ${String(largestMailBytes)} bytes.`), {
      responseCode: 552,
    });
  }
  const named = addresses(parsed.to);
  const mail: ReceivedMail = {
    // A mail without a To header still has recipients: the ones named in the envelope.
    to: (named.length > 0 ? named : session.envelope.rcptTo.map((recipient) => recipient.address)).join(', '),
    subject: parsed.subject ?? '',
    text: parsed.text ?? '',
    html: parsed.html || '',
    at: new Date().toISOString(),
  };
  await mailbox.add(mail);
}

function addresses(field: AddressObject | AddressObject[] | undefined): string[] {
  if (field === undefined) return [];
  const objects = Array.isArray(field) ? field : [field];
  return objects.flatMap((object) => object.value.flatMap(({ address }) => address ?? []));
}

async function answer(request: IncomingMessage, response: ServerResponse, mailbox: Mailbox): Promise<void> {
  const host = (request.headers.host ?? '').replace(/:\d+$/, '');
  if (host !== '127.0.0.1' && host !== 'localhost') {
    // A foreign page can point a name of its own at loopback; mails carry links that open accounts.
    sendJson(response, 403, { title: 'The mailbox answers on 127.0.0.1 and localhost only.' });
  } else if (request.url !== '/') {
    sendJson(response, 404, { title: 'The mailbox is at /.' });
  } else if (request.method === 'GET') {
    sendJson(response, 200, { items: mailbox.list() });
  } else if (request.method === 'DELETE') {
    await mailbox.clear();
    response.writeHead(204).end();
  } else {
    response.setHeader('allow', 'GET, DELETE');
    sendJson(response, 405, { title: 'The mailbox knows GET and DELETE.' });
  }
}

function sendJson(response: ServerResponse, status: number, body: unknown): void {
  response.writeHead(status, { 'content-type': 'application/json; charset=utf-8' }).end(JSON.stringify(body));
}

function listen(server: Server, port: number): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => {
      server.off('error', reject);
      resolve();
    });
  });
}

function portOf(address: string | AddressInfo | null): number {
  if (address === null || typeof address === 'string') throw new Error('The server has no port.');
  return address.port;
}
