import { createServer } from 'node:http';
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { bodyOf, sendJson } from './http';
import { makeMailServer } from './mail';
import type { KeptLetter } from './mail';
import { MODES, Modes } from './mode';
import type { Mode, Service } from './mode';
import { Payments } from './payments';
import { Supplier } from './supplier';

export interface StandInSettings {
  readonly smtpPort: number;
  readonly httpPort: number;
  readonly webhookUrl: string | null;
  readonly webhookSecret: string;
  readonly supplierKey: string;
}
export interface StandIns {
  readonly smtpPort: number;
  readonly httpPort: number;
  readonly modes: Modes;
  readonly letters: readonly KeptLetter[];
  close(): Promise<void>;
}

function escapeHtml(text: string): string {
  return text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;');
}

function letterPage(letters: readonly KeptLetter[]): string {
  const items = letters
    .map(({ at, to, subject, text }) => {
      const body = escapeHtml(text).replaceAll(
        /https?:\/\/[^\s&<]+/g,
        (address) => `<a href="${address}">${address}</a>`,
      );
      return `<article><h2>${escapeHtml(subject)}</h2><p>to ${escapeHtml(to)}, ${escapeHtml(at)}</p><pre>${body}</pre></article>`;
    })
    .join('');
  return `<!doctype html><html lang="en"><meta charset="utf-8"><title>Kept letters</title><style>body{font:16px/1.5 sans-serif;max-width:48rem;margin:2rem auto;padding:0 1rem;background:#f5f0e4;color:#1d221f}article{border-top:1px solid #77705d;padding:1rem 0}pre{white-space:pre-wrap}</style><h1>Letters kept by the mail stand-in</h1>${items || '<p>None so far.</p>'}</html>`;
}

/** Starts the mail, payment and supplier stand-ins on the loopback interface; port 0 takes any free one. */
export async function serveStandIns(settings: StandInSettings): Promise<StandIns> {
  const modes = new Modes();
  const { server: smtp, letters } = makeMailServer(modes);
  const payments = new Payments(modes, settings);
  const supplier = new Supplier(modes, settings.supplierKey);

  const control = async (request: IncomingMessage, response: ServerResponse, path: string) => {
    const service = path.split('/')[2];
    if (request.method === 'GET') return sendJson(response, 200, modes.all());
    const wanted = JSON.parse((await bodyOf(request)) || '{}') as { mode?: string };
    const isService = service === 'mail' || service === 'payments' || service === 'supplier';
    if (request.method !== 'PUT' || !isService || !MODES.includes(wanted.mode as Mode))
      return sendJson(response, 400, {
        message: `PUT /control/{mail|payments|supplier} with a mode of ${MODES.join(', ')}`,
      });
    modes.set(service satisfies Service, wanted.mode as Mode);
    return sendJson(response, 200, modes.all());
  };

  const http = createServer((request, response) => {
    const { pathname, searchParams } = new URL(request.url ?? '/', 'http://localhost');
    const answer = async () => {
      if (pathname.startsWith('/v1/')) return payments.handle(request, response, pathname);
      if (pathname.startsWith('/ordering/')) return supplier.handle(request, response, pathname);
      if (pathname.startsWith('/control')) return control(request, response, pathname);
      if (pathname === '/mail/messages.json') {
        const to = searchParams.get('to');
        return sendJson(response, 200, to ? letters.filter((letter) => letter.to.includes(to)) : letters);
      }
      response.writeHead(pathname === '/mail' ? 200 : 404, { 'content-type': 'text/html; charset=utf-8' });
      response.end(letterPage(letters));
      return undefined;
    };
    answer().catch((error: unknown) =>
      sendJson(response, 500, { message: error instanceof Error ? error.message : String(error) }),
    );
  });

  await new Promise<void>((resolve, reject) => {
    http.once('error', reject);
    http.listen(settings.httpPort, '127.0.0.1', resolve);
  });
  await new Promise<void>((resolve, reject) => {
    smtp.server.once('error', reject);
    smtp.listen(settings.smtpPort, '127.0.0.1', resolve);
  });
  return {
    smtpPort: (smtp.server.address() as AddressInfo).port,
    httpPort: (http.address() as AddressInfo).port,
    modes,
    letters,
    close: async () => {
      await new Promise<void>((resolve) => {
        http.close(() => resolve());
        http.closeAllConnections();
      });
      await new Promise<void>((resolve) => {
        smtp.close(() => resolve());
      });
    },
  };
}
