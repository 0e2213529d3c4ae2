import 'server-only';
import { createHash } from 'node:crypto';
import { environment } from '@/lib/config/env';
import { invalid } from '@/lib/domain/errors';
import { write } from '@/models/db';
import { PasswordResetModel } from '@/models/password-reset';
import { UserModel } from '@/models/user';
import { setPassword } from './accounts';
import { randomToken } from './codes';
import { enqueueLetter } from './outbox';

const VALID_MINUTES = 30;

function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}

/** Sends a letter with a single-use address. Says nothing about whether the account exists. */
export async function askForReset(email: string): Promise<void> {
  await write(async () => {
    const user = await UserModel.findOne({ where: { email, disabledAt: null } });
    if (!user) return;
    const token = randomToken();
    const reset = await PasswordResetModel.create({
      userId: user.id,
      tokenHash: hashToken(token),
      expiresAt: new Date(Date.now() + VALID_MINUTES * 60_000),
    });
    await enqueueLetter(`password-reset:${reset.id}`, {
      to: user.email,
      subject: 'Set a new Benchwright password',
      text: [
        `${user.name},`,
        '',
        'somebody, most likely you, asked to set a new password for this address.',
        `Open this within ${VALID_MINUTES} minutes; it works once:`,
        '',
        `${environment().BASE_URL}/reset-password/${token}`,
        '',
        'If it was not you, nothing has changed and you need do nothing.',
      ].join('\n'),
    });
  });
}

/** @throws DomainError `invalid` for a token that is unknown, used or too old */
export async function redeemReset(token: string, password: string): Promise<void> {
  await write(async () => {
    const reset = await PasswordResetModel.findOne({ where: { tokenHash: hashToken(token) } });
    if (!reset || reset.usedAt || reset.expiresAt.getTime() < Date.now()) {
      throw invalid([
        { pointer: '#/token', detail: 'This address was used or is too old. Ask for a new letter.' },
      ]);
    }
    await reset.update({ usedAt: new Date() });
    await setPassword(reset.userId, password, null, 'set a new password by letter');
  });
}
