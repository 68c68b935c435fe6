import { createTransport, type Transporter } from 'nodemailer';
import type { Config } from '../config.ts';

export interface OutgoingMail {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly messageId: string;
}

export interface MailTransport {
  readonly send: (mail: OutgoingMail) => Promise<void>;
  readonly close: () => void;
}

export function createMailTransport(smtp: Config['smtp']): MailTransport {
  const transporter: Transporter = createTransport({
    host: smtp.host,
    port: smtp.port,
    secure: smtp.secure,
    ...(smtp.user &&
      smtp.password && { auth: { user: smtp.user, pass: smtp.password }, requireTLS: !smtp.secure }),
    connectionTimeout: 10_000,
    greetingTimeout: 10_000,
    socketTimeout: 30_000,
    // A mail is text that we wrote: nothing in it may make this server read a file or an address.
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return {
    send: async (mail) => {
      await transporter.sendMail({
        from: smtp.from,
        to: { name: '', address: mail.to },
        subject: mail.subject,
        text: mail.text,
        html: mail.html,
        messageId: mail.messageId,
        headers: { 'Auto-Submitted': 'auto-generated' },
      });
    },
    close: () => transporter.close(),
  };
}
