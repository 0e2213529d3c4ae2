import { standInUrl } from './server';

export interface KeptLetter {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
}

/** Letters that the mail stand-in received for an address. */
export async function lettersTo(email: string): Promise<KeptLetter[]> {
  const response = await fetch(`${standInUrl()}/mail/messages.json?to=${encodeURIComponent(email)}`);
  return (await response.json()) as KeptLetter[];
}

const WITHIN_MS = 20_000;

/** Waits for a letter that fits; the outbox sends within seconds. */
export async function letterTo(email: string, fits: (letter: KeptLetter) => boolean): Promise<KeptLetter> {
  const until = Date.now() + WITHIN_MS;
  for (;;) {
    const letter = (await lettersTo(email)).find(fits);
    if (letter) return letter;
    if (Date.now() > until) throw new Error(`No such letter came to ${email} within ${WITHIN_MS / 1000} s`);
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
}
