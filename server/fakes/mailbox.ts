import { appendFile, mkdir, readFile, rename, writeFile } from 'node:fs/promises';
import { join } from 'node:path';

/** One mail as it was received. `at` is the moment of receipt, ISO 8601 in UTC. */
export interface ReceivedMail {
  to: string;
  subject: string;
  text: string;
  html: string;
  at: string;
}

/** The mails a mailbox keeps; older ones are forgotten. */
export const mailboxLimit = 200;

/** The received mails, in memory and as JSON lines in `mails.jsonl` of a folder. */
export class Mailbox {
  private constructor(
    private readonly file: string,
    private mails: ReceivedMail[],
  ) {}

  /** Opens the folder's mailbox, keeping the newest 200 mails, and makes the folder when it is missing. */
  static async open(dir: string): Promise<Mailbox> {
    await mkdir(dir, { recursive: true });
    const file = join(dir, 'mails.jsonl');
    const mailbox = new Mailbox(file, (await readMails(file)).slice(-mailboxLimit));
    await mailbox.rewrite();
    return mailbox;
  }

  /** Keeps a mail; it is on disk when the promise resolves. */
  async add(mail: ReceivedMail): Promise<void> {
    await appendFile(this.file, `${JSON.stringify(mail)}\n`);
    this.mails = [...this.mails, mail].slice(-mailboxLimit);
  }

  /** The mails kept, newest first. */
  list(): ReceivedMail[] {
    return this.mails.toReversed();
  }

  /** Forgets every mail. */
  async clear(): Promise<void> {
    this.mails = [];
    await this.rewrite();
  }

  private async rewrite(): Promise<void> {
    const unfinished = `${this.file}.new`;
    await writeFile(unfinished, this.mails.map((mail) => `${JSON.stringify(mail)}\n`).join(''));
    await rename(unfinished, this.file);
  }
}

async function readMails(file: string): Promise<ReceivedMail[]> {
  let text: string;
  try {
    text = await readFile(file, 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return [];
    throw error;
  }
  // What follows the last newline is a line cut off by a kill, before its mail was acknowledged.
  return text
    .slice(0, text.lastIndexOf('\n') + 1)
    .split('\n')
    .filter((line) => line !== '')
    .map((line) => JSON.parse(line) as ReceivedMail);
}
