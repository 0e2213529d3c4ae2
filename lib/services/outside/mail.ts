import 'server-only';
import nodemailer from 'nodemailer';
import { environment } from '@/lib/config/env';
import { DomainError } from '@/lib/domain/errors';

/** A letter; plain text always, an attachment where a document goes with it. */
export interface Letter {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly attachments?: readonly {
    readonly filename: string;
    readonly contentBase64: string;
    readonly contentType: string;
  }[];
}

/** @throws DomainError `unavailable` where no mail server is set; whatever the server refuses otherwise */
export async function sendLetter(letter: Letter, messageId: string): Promise<void> {
  const { SMTP_URL, MAIL_FROM } = environment();
  if (!SMTP_URL) throw new DomainError('unavailable', 'No mail server is set (SMTP_URL).');
  const transport = nodemailer.createTransport({
    url: SMTP_URL,
    connectionTimeout: 5000,
    greetingTimeout: 5000,
    socketTimeout: 10_000,
  });
  try {
    await transport.sendMail({
      from: MAIL_FROM,
      to: letter.to,
      subject: letter.subject,
      text: letter.text,
      messageId: `<${messageId}@benchwright.example>`,
      attachments: letter.attachments?.map(({ filename, contentBase64, contentType }) => ({
        filename,
        content: Buffer.from(contentBase64, 'base64'),
        contentType,
      })),
    });
  } finally {
    transport.close();
  }
}
