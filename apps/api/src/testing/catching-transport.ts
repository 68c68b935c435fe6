import type { MailTransport, OutgoingMail } from '../mail/transport.ts';

export interface CatchingTransport extends MailTransport {
  readonly sent: OutgoingMail[];
  /** The error that the next sending ends with, until it is set to nothing again. */
  fault: Error | undefined;
}

/** Stands where the mail server is: remembers what left, or fails as it is told. */
export function catchingTransport(): CatchingTransport {
  const transport: CatchingTransport = {
    sent: [],
    fault: undefined,
    send: (mail) => {
      if (transport.fault) return Promise.reject(transport.fault);
      transport.sent.push(mail);
      return Promise.resolve();
    },
    close: () => undefined,
  };
  return transport;
}
