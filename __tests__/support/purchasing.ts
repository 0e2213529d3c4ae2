import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { toMicro } from '@/lib/domain/quantities';
import { DomainError } from '@/lib/domain/errors';
import type { Viewer } from '@/lib/domain/roles';
import type { OrderDetail } from '@/lib/schemas/orders';
import { approveOrder } from '@/lib/services/order-approval';
import { sendOrder } from '@/lib/services/order-sending';
import { createOrder, submitOrder } from '@/lib/services/orders';
import { drainOutbox } from '@/lib/services/outbox';
import { receivePaymentEvent } from '@/lib/services/payments';
import { BudgetModel } from '@/models/budget';
import { OfferModel } from '@/models/offer';
import { OutboxMessageModel } from '@/models/outbox-message';
import { SupplierModel } from '@/models/supplier';
import { serveStandIns } from '../../scripts/stand-ins/serve';
import type { StandIns } from '../../scripts/stand-ins/serve';
import { buildPerson, buildSubstance, openPrepRoom } from './prep-room';
import type { PrepRoom } from './prep-room';

const SUPPLIER_KEY = 'test-key-of-the-supplier';
export const WEBHOOK_SECRET = 'whsec_test_secret_of_this_house';

/** An event as it came to the house, and how it was answered: null for taken in, else the refusal. */
export interface ReceivedEvent {
  readonly payload: string;
  readonly signature: string;
  readonly refusal: string | null;
}

/** A prep room that buys: a supplier with two packs on offer, a budget, and the stand-ins on real sockets. */
export interface Purchasing {
  readonly house: PrepRoom;
  readonly standIns: StandIns;
  readonly events: readonly ReceivedEvent[];
  readonly supplier: SupplierModel;
  readonly budget: BudgetModel;
  /** 25 g of silver nitrate at 84.00, hazardous; 250 g of copper sulfate at 9.41. */
  readonly silver: OfferModel;
  readonly copper: OfferModel;
  readonly drafter: Viewer;
  /** May approve up to 500.00. */
  readonly buyer: Viewer;
  close(): Promise<void>;
}

/** Takes in the payment service's events over HTTP as the app's route does. */
async function serveWebhook(events: ReceivedEvent[]) {
  const server = createServer((request, response) => {
    const take = async () => {
      const chunks: Buffer[] = [];
      for await (const chunk of request) chunks.push(chunk as Buffer);
      const payload = Buffer.concat(chunks).toString('utf8');
      const signature = String(request.headers['stripe-signature']);
      const refusal = await receivePaymentEvent(payload, signature).then(
        () => null,
        (error: unknown) => (error instanceof DomainError ? error.code : String(error)),
      );
      events.push({ payload, signature, refusal });
      response.writeHead(refusal ? 403 : 200).end();
    };
    void take();
  });
  await new Promise<void>((resolve) => {
    server.listen(0, '127.0.0.1', resolve);
  });
  return server;
}

export async function openPurchasing(): Promise<Purchasing> {
  const events: ReceivedEvent[] = [];
  const webhook = await serveWebhook(events);
  const standIns = await serveStandIns({
    smtpPort: 0,
    httpPort: 0,
    webhookUrl: `http://127.0.0.1:${(webhook.address() as AddressInfo).port}`,
    webhookSecret: WEBHOOK_SECRET,
    supplierKey: SUPPLIER_KEY,
  });
  Object.assign(process.env, {
    SMTP_URL: `smtp://127.0.0.1:${standIns.smtpPort}`,
    STRIPE_SECRET_KEY: 'sk_test_of_this_house',
    STRIPE_WEBHOOK_SECRET: WEBHOOK_SECRET,
    STRIPE_API_BASE: `http://127.0.0.1:${standIns.httpPort}`,
    SUPPLIER_API_BASE: `http://127.0.0.1:${standIns.httpPort}`,
    SUPPLIER_API_KEY: SUPPLIER_KEY,
  });
  const house = await openPrepRoom();
  const supplier = await SupplierModel.create({
    name: 'Fenwold Reagents',
    email: 'orders@fenwold.example',
    accountCode: 'LARK-201',
    leadDays: 4,
    minimumOrderMinor: 20_00,
    carriageMinor: 9_50,
    hazardSurchargeMinor: 15_00,
  });
  const budget = await BudgetModel.create({
    name: 'Teaching reagents',
    year: 2026,
    amountMinor: 900_00,
    currency: 'GBP',
  });
  const offer = async (substanceId: string, pack: number, priceMinor: number, hazardous: boolean) => {
    const { unit } = await buildSubstance(substanceId);
    return OfferModel.create({
      supplierId: supplier.id,
      substanceId,
      stockNumber: `${substanceId}-${pack}`,
      packMicro: toMicro(pack),
      unit,
      priceMinor,
      hazardous,
    });
  };
  const silver = await offer('silver-nitrate', 25, 84_00, true);
  const copper = await offer('copper-sulfate', 250, 9_41, false);
  const buyer = await buildPerson(['purchasing']);
  return {
    house,
    standIns,
    events,
    supplier,
    budget,
    silver,
    copper,
    drafter: await buildPerson(['prep', 'purchasing']),
    buyer: { ...buyer, approvalLimitMinor: 500_00 },
    close: async () => {
      await house.close();
      await standIns.close();
      await new Promise((resolve) => webhook.close(resolve));
    },
  };
}

type Lines = readonly { offer: OfferModel; packs: number }[];

export function draftOrder(room: Purchasing, lines: Lines, drafter = room.drafter): Promise<OrderDetail> {
  return createOrder(drafter, {
    supplierId: room.supplier.id,
    budgetId: room.budget.id,
    note: null,
    lines: lines.map(({ offer, packs }) => ({ offerId: offer.id, packs })),
  });
}

export async function orderForApproval(room: Purchasing, lines: Lines): Promise<OrderDetail> {
  const { id, version } = await draftOrder(room, lines);
  return submitOrder(room.drafter, id, { version, reason: '' });
}

export async function approvedOrder(room: Purchasing, lines: Lines): Promise<OrderDetail> {
  const { id, version } = await orderForApproval(room, lines);
  return approveOrder(room.buyer, id, { version, reason: '' });
}

/** Approved and put into the outbox, from where nothing goes until it is drained. */
export async function sentOrder(room: Purchasing, lines: Lines): Promise<OrderDetail> {
  const { id, version } = await approvedOrder(room, lines);
  return sendOrder(room.buyer, id, { version, reason: '' });
}

/** Tries everything that waits now, whenever its next try was due. */
export async function tryAllNow(): Promise<number> {
  await OutboxMessageModel.update({ nextAttemptAt: new Date(0) }, { where: { state: 'waiting' } });
  return drainOutbox();
}
