// What each child is told through its environment, and what is kept from it.

const OURS = /^(DATABASE_|TREENAIL_|PAYMENT_SERVICE_|SMTP_|ONE_TIME_CODES_|PORT$|NODE_ENV$)/;

/** The caller's environment without anything that is meant for one child only. */
const plain = (env) => Object.fromEntries(Object.entries(env).filter(([name]) => !OURS.test(name)));

const own = (env) => Object.fromEntries(Object.entries(env).filter(([name]) => name.startsWith('TREENAIL_')));

const local = (port) => `http://127.0.0.1:${port}`;

/** Where a browser finds the stand-in's card page: beside the site, so that a phone that reaches one reaches both. */
export function cardPageOrigin({ publicAddress }, ports) {
  const host = URL.canParse(publicAddress ?? '') ? new URL(publicAddress).hostname : '';
  const isLocal = host === '' || /^(localhost|127(\.\d+){3}|\[::1\])$/.test(host);
  return isLocal ? local(ports.paymentService) : `http://${host}:${ports.paymentService}`;
}

/** The demonstration never reaches a real service: whatever else was set, its own stand-ins are named. */
function demonstrationEnvironment({ env, settings, port, secrets, ports }) {
  return {
    TREENAIL_PUBLIC_ADDRESS: settings.publicAddress ?? `http://localhost:${port}`,
    TREENAIL_SESSION_SECRET: env.TREENAIL_SESSION_SECRET || secrets.session,
    TREENAIL_PAYMENT_KEY: secrets.paymentKey,
    TREENAIL_PAYMENT_WEBHOOK_SECRET: secrets.paymentWebhook,
    TREENAIL_PAYMENT_API: local(ports.paymentService),
    TREENAIL_PAYMENT_PAGE_ORIGIN: cardPageOrigin(settings, ports),
    TREENAIL_PAYMENT_CONTROLS: local(ports.paymentControls),
    TREENAIL_SMTP_URL: `smtp://127.0.0.1:${ports.smtp}`,
  };
}

/** For the web process, the worker, the migration and the seeds. Live mode passes on what was set, and adds nothing. */
export function appEnvironment({ env, settings, port, database, secrets, ports }) {
  return {
    ...plain(env),
    ...own(env),
    NODE_ENV: settings.isDev ? 'development' : 'production',
    TREENAIL_MODE: settings.mode,
    TREENAIL_DATA: settings.data,
    PORT: String(port),
    DATABASE_URL: database.url,
    ...(settings.isDemonstration ? demonstrationEnvironment({ env, settings, port, secrets, ports }) : {}),
  };
}

/** For tools that need no secret at all: npm, apt, the build. */
export const toolEnvironment = (env) => plain(env);

export function standInEnvironments({ env, settings, port, secrets, ports }) {
  const common = { ...plain(env), NODE_ENV: 'production' };
  return {
    'payment-service': {
      ...common,
      PAYMENT_SERVICE_PORT: String(ports.paymentService),
      PAYMENT_SERVICE_CONTROL_PORT: String(ports.paymentControls),
      PAYMENT_SERVICE_PUBLIC: cardPageOrigin(settings, ports),
      PAYMENT_SERVICE_STATE: `${settings.data}/payment-service`,
      PAYMENT_SERVICE_KEY: secrets.paymentKey,
      PAYMENT_SERVICE_WEBHOOK_URL: `${local(port)}/webhooks/payments`,
      PAYMENT_SERVICE_WEBHOOK_SECRET: secrets.paymentWebhook,
    },
    smtp: {
      ...common,
      SMTP_PORT: String(ports.smtp),
      SMTP_PAGE_PORT: String(ports.mailPage),
      SMTP_STATE: `${settings.data}/mail`,
    },
    'one-time-codes': { ...common, ONE_TIME_CODES_PORT: String(ports.oneTimeCodes) },
  };
}
