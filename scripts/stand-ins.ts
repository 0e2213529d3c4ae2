import { serveStandIns } from './stand-ins/serve';

/** Runs the stand-ins for mail, payments and the suppliers' ordering service until told to stop. */
async function main(): Promise<void> {
  const port = Number(process.env.PORT ?? 3000);
  const standIns = await serveStandIns({
    smtpPort: Number(process.env.SMTP_PORT ?? port + 1),
    httpPort: Number(process.env.STAND_IN_HTTP_PORT ?? port + 2),
    webhookUrl: `http://127.0.0.1:${port}/api/payments/webhook`,
    webhookSecret: process.env.STRIPE_WEBHOOK_SECRET ?? '',
    supplierKey: process.env.SUPPLIER_API_KEY ?? '',
  });
  console.log(
    `Stand-ins: SMTP on ${standIns.smtpPort}; payments, ordering and kept letters on http://127.0.0.1:${standIns.httpPort}/mail`,
  );
  for (const signal of ['SIGINT', 'SIGTERM'] as const) {
    process.once(signal, () => {
      void standIns.close().then(() => process.exit(0));
    });
  }
}

main().catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
