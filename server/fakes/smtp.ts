import { parseArgs } from 'node:util';
import { startMailServer } from './mail-server';

/**
 * The program that stands in for a mail service on one machine.
 *
 *     node --import tsx server/fakes/smtp.ts --dir DIR --smtp-port PORT --mailbox-port PORT
 */
const { values } = parseArgs({
  options: { dir: { type: 'string' }, 'smtp-port': { type: 'string' }, 'mailbox-port': { type: 'string' } },
});
const { dir } = values;
const smtpPort = Number(values['smtp-port']);
const mailboxPort = Number(values['mailbox-port']);
if (dir === undefined || !Number.isInteger(smtpPort) || !Number.isInteger(mailboxPort)) {
  process.stderr.write('Usage: smtp.ts --dir DIR --smtp-port PORT --mailbox-port PORT\n');
  process.exit(2);
}

const server = await startMailServer({ dir, smtpPort, mailboxPort });
process.stdout.write(
  `Mail fake ready: SMTP on 127.0.0.1:${String(server.smtpPort)}, mailbox on http://127.0.0.1:${String(server.mailboxPort)}/\n`,
);

for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.once(signal, () => {
    void server.close().then(() => process.exit(0));
  });
}
