import { createTransport } from 'nodemailer';
import type { Config } from '../config';

export type OutgoingMail = { to: string; subject: string; text: string; messageId: string };

/** `unknown`: the connection ended after the message was handed over and before the server said that it has it. */
export type Delivery = { state: 'sent' } | { state: 'failed' | 'unknown'; reason: string };

export type Mailer = { send: (mail: OutgoingMail) => Promise<Delivery> };

const CONNECT_MS = 15_000;

/** Sends over SMTP to the server of the settings, or to the local outbox where none is set. */
export function createMailer({ smtpUrl, mailFrom }: Pick<Config, 'smtpUrl' | 'mailFrom'>): Mailer {
  return {
    async send(mail) {
      if (!smtpUrl) return { state: 'failed', reason: 'There is no mail server.' };
      const transport = createTransport({
        url: smtpUrl,
        connectionTimeout: CONNECT_MS,
        greetingTimeout: CONNECT_MS,
        disableFileAccess: true,
        disableUrlAccess: true,
      });
      try {
        await transport.sendMail({ from: mailFrom, ...mail });
        return { state: 'sent' };
      } catch (error) {
        return { state: wasRefused(error) ? 'failed' : 'unknown', reason: messageOf(error) };
      } finally {
        transport.close();
      }
    },
  };
}

const BEFORE_THE_MESSAGE = ['EDNS', 'ETLS', 'EAUTH', 'ENOAUTH', 'EENVELOPE'];

/** What is certain not to have gone out: refused by the server's own code, or no connection was ever made. */
function wasRefused(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  if ('responseCode' in error && typeof error.responseCode === 'number' && error.responseCode >= 400)
    return true;
  if ('syscall' in error && error.syscall === 'connect') return true;
  return 'code' in error && typeof error.code === 'string' && BEFORE_THE_MESSAGE.includes(error.code);
}

const messageOf = (error: unknown) => (error instanceof Error ? error.message : String(error)).slice(0, 500);
