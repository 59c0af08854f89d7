import type { Handler } from './handler';

/** Sends one mail. Should the worker die between the mail service's yes and ours, it is sent a second time: once too
 *  often is better than not at all. */
export const sendMail: Handler<'mail.send'> = async (mail, { mailer }) => {
  await mailer.send(mail);
  return null;
};
