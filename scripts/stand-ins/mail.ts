import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import type { Modes } from './mode';
import { SLOW_MS, wait } from './mode';

/** A letter as it came in over SMTP. */
export interface KeptLetter {
  readonly at: string;
  readonly to: string;
  readonly from: string;
  readonly subject: string;
  readonly text: string;
  readonly messageId: string;
}

const MOST_LETTERS = 500;

/** An SMTP server that keeps what it receives, newest first. */
export function makeMailServer(modes: Modes): {
  readonly server: SMTPServer;
  readonly letters: KeptLetter[];
} {
  const letters: KeptLetter[] = [];
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    logger: false,
    onConnect: (_session, callback) => {
      if (modes.get('mail') === 'down') callback(new Error('421 out of service'));
      else callback();
    },
    onData: (stream, session, callback) => {
      const mode = modes.get('mail');
      simpleParser(stream)
        .then(async (mail) => {
          if (mode === 'slow') await wait(SLOW_MS);
          if (mode === 'refuse') throw new Error('554 refused');
          letters.unshift({
            at: new Date().toISOString(),
            to: session.envelope.rcptTo.map(({ address }) => address).join(', '),
            from: mail.from?.text ?? '',
            subject: mail.subject ?? '',
            text: mail.text ?? '',
            messageId: mail.messageId ?? '',
          });
          letters.length = Math.min(letters.length, MOST_LETTERS);
          callback();
        })
        .catch((error: unknown) => callback(error instanceof Error ? error : new Error(String(error))));
    },
  });
  server.on('error', () => undefined);
  return { server, letters };
}
