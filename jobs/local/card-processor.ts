import { startCardProcessor } from './card-processor-server';

/** Started by `npm run up` when no real card processor is named. What it knows is kept beside the database. */
async function main(): Promise<void> {
  const server = await startCardProcessor({
    port: Number(process.env.CARD_PROCESSOR_PORT ?? 4242), secretKey: process.env.STRIPE_SECRET_KEY ?? 'sk_test_local', webhookSecret: process.env.STRIPE_WEBHOOK_SECRET ?? 'whsec_local',
    eventsUrl: process.env.CARD_EVENTS_URL ?? 'http://127.0.0.1:3000/api/card-events', stateFile: process.env.CARD_PROCESSOR_STATE,
  });
  for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => void server.close().then(() => process.exit(0)));
}

void main();
