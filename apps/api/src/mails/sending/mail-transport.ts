import { Injectable, type OnApplicationShutdown } from '@nestjs/common';
import { createTransport } from 'nodemailer';
import { AppConfig } from '../../config/app-config.js';
import type { SmtpSettings } from '../../config/mail-settings.js';
import type { OutgoingMail } from './outgoing-mails.js';

const CONNECT_TIMEOUT_MS = 15_000;
/** Without a byte from the server; receiving and scanning a message may take it a while (RFC 5321, 4.5.3.2). */
const SILENCE_TIMEOUT_MS = 120_000;

/** How an attempt to hand a message on ended. */
export type Handover =
  | { kind: 'sent' }
  /** The server will not take this message for this recipient. */
  | { kind: 'refused'; reason: string }
  /** It may well do so later. */
  | { kind: 'delayed'; reason: string };

export interface Recipient {
  name: string;
  address: string;
}

/** Hands messages to the mail server; without one they are kept, and the mailbox page shows them. */
@Injectable()
export class MailTransport implements OnApplicationShutdown {
  private transporter: ReturnType<typeof open> | undefined;

  constructor(private readonly config: AppConfig) {}

  async send(mail: OutgoingMail, to: Recipient, subject: string, signal: AbortSignal): Promise<Handover> {
    const { smtp, from } = this.config.mail;
    if (smtp === null) return { kind: 'sent' };
    this.transporter ??= open(smtp);
    try {
      await this.transporter.sendMail({
        ...mail,
        ...{ from, to, subject, signal },
        // Not to be answered by machines (RFC 3834, 5).
        headers: { 'Auto-Submitted': 'auto-generated' },
      });
      return { kind: 'sent' };
    } catch (error) {
      return outcomeOf(error);
    }
  }

  onApplicationShutdown(): void {
    this.transporter?.close();
  }
}

function open({ host, port, secure, requireTls, auth }: SmtpSettings) {
  return createTransport({
    pool: true,
    // The queue decides when a message is tried again, and counts it.
    maxRequeues: 0,
    maxConnections: 2,
    idleTimeout: 30_000,
    connectionTimeout: CONNECT_TIMEOUT_MS,
    greetingTimeout: CONNECT_TIMEOUT_MS,
    dnsTimeout: CONNECT_TIMEOUT_MS,
    socketTimeout: SILENCE_TIMEOUT_MS,
    ...{ host, port, secure, requireTLS: requireTls },
    ...(auth && { auth }),
    disableFileAccess: true,
    disableUrlAccess: true,
  });
}

interface SmtpError {
  message: string;
  responseCode?: number;
  response?: string;
  command?: string;
}

/**
 * What a failure means for the message. A reply 5yz to the recipient or to the message is final (RFC 5321, 4.2.1), but
 * for 503, which speaks of the order of commands. A refused sign-in or sender is for the administrator to mend: it waits.
 */
export function outcomeOf(error: unknown): Handover {
  if (!(error instanceof Error)) throw error;
  const { responseCode = 0, response, command, message } = error as SmtpError;
  const isFinal = responseCode >= 500 && responseCode < 600 && responseCode !== 503;
  const isAboutMessage = command === 'RCPT TO' || command === 'DATA';
  const reason = (response ?? message).replace(/\s+/g, ' ').slice(0, 500);
  return { kind: isFinal && isAboutMessage ? 'refused' : 'delayed', reason };
}
