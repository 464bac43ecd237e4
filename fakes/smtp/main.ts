// Starts the mail stand-in as a process of its own.
import { z } from 'zod';
import { startSmtp } from './start-smtp.ts';

const port = z.coerce.number().int().min(0).max(65535);
const environment = z
  .object({ SMTP_PORT: port, SMTP_PAGE_PORT: port, SMTP_STATE: z.string().min(1).optional() })
  .parse(process.env);

const standIn = await startSmtp({
  port: environment.SMTP_PORT,
  pagePort: environment.SMTP_PAGE_PORT,
  ...(environment.SMTP_STATE && { stateFolder: environment.SMTP_STATE }),
});
console.log(`mail received: ${standIn.pageUrl} (takes mail at ${standIn.smtpUrl})`);

const stop = (): void => void standIn.stop().then(() => process.exit(0));
process.once('SIGTERM', stop);
process.once('SIGINT', stop);
