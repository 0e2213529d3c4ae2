import type { IncomingMessage, ServerResponse } from 'node:http';
import { bodyOf, headerOf, sendJson } from './http';
import type { Modes } from './mode';
import { SLOW_MS, wait } from './mode';

/** A supplier's ordering service: takes an order once per key and answers line by line. */

interface OrderedLine {
  readonly line: string;
  readonly stockNumber: string;
  readonly packs: number;
  readonly priceMinor: number;
}
interface OrderedBody {
  readonly order: string;
  readonly account: string;
  readonly lines: readonly OrderedLine[];
}

const PRICE_RISE = 1.08;

function isOrder(value: unknown): value is OrderedBody {
  const body = value as Partial<OrderedBody> | null;
  return (
    typeof body?.order === 'string' &&
    typeof body.account === 'string' &&
    Array.isArray(body.lines) &&
    body.lines.length > 0 &&
    body.lines.every(
      (line: Partial<OrderedLine>) =>
        typeof line.line === 'string' &&
        typeof line.stockNumber === 'string' &&
        Number.isInteger(line.packs) &&
        (line.packs ?? 0) > 0 &&
        Number.isInteger(line.priceMinor),
    )
  );
}

export class Supplier {
  private readonly byKey = new Map<string, unknown>();
  private readonly byReference = new Map<string, unknown>();
  private count = 0;

  constructor(
    private readonly modes: Modes,
    private readonly apiKey: string,
  ) {}

  async handle(request: IncomingMessage, response: ServerResponse, path: string): Promise<void> {
    const mode = this.modes.get('supplier');
    if (mode === 'down') return sendJson(response, 503, { message: 'Out of service' });
    if (mode === 'slow') await wait(SLOW_MS);
    if (mode === 'garbage') {
      response.writeHead(200, { 'content-type': 'application/json' });
      response.end('{"status": "accep');
      return;
    }
    if (headerOf(request, 'authorization') !== `Bearer ${this.apiKey}`)
      return sendJson(response, 401, { message: 'Unknown account key' });
    const reference = /^\/ordering\/orders\/([\w-]+)$/.exec(path)?.[1];
    if (request.method === 'GET' && reference) {
      const order = this.byReference.get(reference);
      return order ? sendJson(response, 200, order) : sendJson(response, 404, { message: 'No such order' });
    }
    if (request.method !== 'POST' || path !== '/ordering/orders')
      return sendJson(response, 404, { message: 'No such address' });
    const key = headerOf(request, 'idempotency-key');
    const before = this.byKey.get(key);
    if (before) return sendJson(response, 200, before);
    let body: unknown;
    try {
      body = JSON.parse(await bodyOf(request));
    } catch {
      return sendJson(response, 400, { message: 'Not JSON' });
    }
    if (!isOrder(body)) return sendJson(response, 422, { message: 'The order is incomplete' });
    if (mode === 'refuse') return sendJson(response, 422, { message: 'The account is on hold' });
    const answer = this.acknowledge(body);
    this.byKey.set(key, answer);
    this.byReference.set(answer.reference, answer);
    sendJson(response, 201, answer);
  }

  private acknowledge(body: OrderedBody) {
    const mode = this.modes.get('supplier');
    this.count += 1;
    return {
      reference: `S${String(70_000 + this.count)}`,
      order: body.order,
      status: 'acknowledged' as const,
      lines: body.lines.map((line, index) => {
        if (mode === 'backorder' || (mode === 'partial' && index % 2 === 1))
          return {
            line: line.line,
            status: 'back-ordered' as const,
            packs: line.packs,
            priceMinor: line.priceMinor,
          };
        if (mode === 'price-change')
          return {
            line: line.line,
            status: 'price-changed' as const,
            packs: line.packs,
            priceMinor: Math.round(line.priceMinor * PRICE_RISE),
          };
        return {
          line: line.line,
          status: 'accepted' as const,
          packs: line.packs,
          priceMinor: line.priceMinor,
        };
      }),
    };
  }
}
