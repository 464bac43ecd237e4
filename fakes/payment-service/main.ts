// Runs the payment stand-in as a process of its own, set by its environment alone.
import { z } from 'zod';
import { startPaymentService } from './start-payment-service.ts';

const port = z.coerce.number().int().min(0).max(65535).default(0);
const environmentSchema = z.object({
  PAYMENT_SERVICE_PORT: port,
  PAYMENT_SERVICE_CONTROL_PORT: port,
  PAYMENT_SERVICE_STATE: z.string().min(1),
  PAYMENT_SERVICE_KEY: z.string().startsWith('sk_test_'),
  PAYMENT_SERVICE_PUBLIC: z.url().optional(),
  PAYMENT_SERVICE_WEBHOOK_URL: z.url().optional(),
  PAYMENT_SERVICE_WEBHOOK_SECRET: z.string().min(1).optional(),
});

function readEnvironment(): z.infer<typeof environmentSchema> {
  const parsed = environmentSchema.safeParse(process.env);
  if (parsed.success) return parsed.data;
  console.error(`The payment stand-in cannot start:\n${z.prettifyError(parsed.error)}`);
  process.exit(1);
}

const env = readEnvironment();
const url = env.PAYMENT_SERVICE_WEBHOOK_URL;
const secret = env.PAYMENT_SERVICE_WEBHOOK_SECRET;
const running = await startPaymentService({
  key: env.PAYMENT_SERVICE_KEY,
  stateFolder: env.PAYMENT_SERVICE_STATE,
  port: env.PAYMENT_SERVICE_PORT,
  controlPort: env.PAYMENT_SERVICE_CONTROL_PORT,
  publicUrl: env.PAYMENT_SERVICE_PUBLIC?.replace(/\/+$/, ''),
  webhook: url && secret ? { url, secret } : undefined,
});
console.log(`payment stand-in: service ${running.apiUrl}, controls ${running.controlUrl}`);

async function stopCleanly(): Promise<void> {
  await running.stop();
  process.exit(0);
}
process.once('SIGTERM', () => void stopCleanly());
process.once('SIGINT', () => void stopCleanly());
