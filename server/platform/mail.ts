import nodemailer from 'nodemailer';

export interface Mail {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export interface Mailer {
  send(mail: Mail): Promise<void>;
  ping(): Promise<void>;
  close(): void;
}

/** Mail over SMTP. @param from the sender, `Name <address>` */
export function openMailer(smtpUrl: string, from: string): Mailer {
  const transport = nodemailer.createTransport(smtpUrl, { from });
  return {
    async send(mail) {
      await transport.sendMail({ from, ...mail });
    },
    async ping() {
      await transport.verify();
    },
    close() {
      transport.close();
    },
  };
}
