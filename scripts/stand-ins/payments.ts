import { createHmac, randomBytes } from 'node:crypto';
import type { IncomingMessage, ServerResponse } from 'node:http';
import { bodyOf, headerOf, sendJson } from './http';
import type { Modes } from './mode';
import { SLOW_MS, wait } from './mode';

/**
 * The payment service as far as this house uses it: payment intents that are created and confirmed in one call,
 * read and cancelled, in the shapes the stripe SDK reads; and signed events sent to the app.
 */

interface Intent {
  readonly id: string;
  readonly object: 'payment_intent';
  readonly amount: number;
  readonly currency: string;
  status: 'succeeded' | 'canceled' | 'requires_payment_method';
  readonly metadata: Readonly<Record<string, string>>;
  readonly created: number;
  readonly livemode: false;
}

interface Settings {
  readonly webhookUrl: string | null;
  readonly webhookSecret: string;
}

export class Payments {
  private readonly intents = new Map<string, Intent>();
  private readonly answers = new Map<string, { status: number; body: unknown }>();

  constructor(
    private readonly modes: Modes,
    private readonly settings: Settings,
  ) {}

  async handle(request: IncomingMessage, response: ServerResponse, path: string): Promise<void> {
    const mode = this.modes.get('payments');
    if (mode === 'down') {
      request.socket.destroy();
      return;
    }
    if (mode === 'slow') await wait(SLOW_MS);
    if (mode === 'garbage') {
      response.writeHead(200, { 'content-type': 'text/html' });
      response.end('<html>maintenance</html>');
      return;
    }
    if (!headerOf(request, 'authorization').startsWith('Bearer sk_'))
      return this.refuse(response, 401, 'invalid_request_error', 'No API key');
    const form = new URLSearchParams(await bodyOf(request));
    const key = headerOf(request, 'idempotency-key');
    const kept = key ? this.answers.get(`${request.method} ${path} ${key}`) : undefined;
    if (kept) return sendJson(response, kept.status, kept.body, { 'idempotent-replayed': 'true' });
    const answer = this.answer(request.method ?? 'GET', path, form, mode === 'refuse');
    if (key && request.method === 'POST') this.answers.set(`${request.method} ${path} ${key}`, answer);
    sendJson(response, answer.status, answer.body, { 'request-id': `req_${randomBytes(6).toString('hex')}` });
  }

  private answer(
    method: string,
    path: string,
    form: URLSearchParams,
    isDeclining: boolean,
  ): { status: number; body: unknown } {
    const [, id, action] = /^\/v1\/payment_intents(?:\/([^/]+))?(?:\/(\w+))?$/.exec(path) ?? [];
    if (method === 'POST' && path === '/v1/payment_intents') return this.create(form, isDeclining);
    const intent = id ? this.intents.get(id) : undefined;
    if (!intent)
      return {
        status: 404,
        body: {
          error: {
            type: 'invalid_request_error',
            code: 'resource_missing',
            message: `No such payment_intent: ${id ?? path}`,
          },
        },
      };
    if (method === 'POST' && action === 'cancel') intent.status = 'canceled';
    return { status: 200, body: intent };
  }

  private create(form: URLSearchParams, isDeclined: boolean): { status: number; body: unknown } {
    const amount = Number(form.get('amount'));
    const currency = form.get('currency') ?? '';
    if (!Number.isInteger(amount) || amount < 1)
      return {
        status: 400,
        body: { error: { type: 'invalid_request_error', param: 'amount', message: 'Invalid integer' } },
      };
    if (!/^[a-z]{3}$/.test(currency))
      return {
        status: 400,
        body: { error: { type: 'invalid_request_error', param: 'currency', message: 'Invalid currency' } },
      };
    const metadata = Object.fromEntries(
      [...form].flatMap(([name, value]) => {
        const field = /^metadata\[(\w+)\]$/.exec(name)?.[1];
        return field ? [[field, value]] : [];
      }),
    );
    const intent: Intent = {
      id: `pi_${randomBytes(12).toString('hex')}`,
      object: 'payment_intent',
      amount,
      currency,
      status: isDeclined ? 'requires_payment_method' : 'succeeded',
      metadata,
      created: Math.floor(Date.now() / 1000),
      livemode: false,
    };
    this.intents.set(intent.id, intent);
    void this.tell(isDeclined ? 'payment_intent.payment_failed' : 'payment_intent.succeeded', intent);
    if (isDeclined) {
      return {
        status: 402,
        body: {
          error: {
            type: 'card_error',
            code: 'card_declined',
            message: 'The payment was declined.',
            payment_intent: intent,
          },
        },
      };
    }
    return { status: 200, body: intent };
  }

  /** Sends a signed event, as the service does. */
  private async tell(type: string, intent: Intent): Promise<void> {
    const { webhookUrl, webhookSecret } = this.settings;
    if (!webhookUrl) return;
    const payload = JSON.stringify({
      id: `evt_${randomBytes(12).toString('hex')}`,
      object: 'event',
      type,
      created: Math.floor(Date.now() / 1000),
      data: { object: intent },
    });
    const time = Math.floor(Date.now() / 1000);
    const signature = createHmac('sha256', webhookSecret).update(`${time}.${payload}`).digest('hex');
    await fetch(webhookUrl, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'stripe-signature': `t=${time},v1=${signature}` },
      body: payload,
    }).catch(() => undefined);
  }

  private refuse(response: ServerResponse, status: number, type: string, message: string): void {
    sendJson(response, status, { error: { type, message } });
  }
}
