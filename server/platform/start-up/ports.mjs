// Picks free ports, keeps them the same from one start to the next, and never gives one out twice.
import { readFileSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { StartFault } from './faults.mjs';

export const DEFAULT_PORT = 4173;

/** Where each stand-in's search begins the first time. */
const FIRST_WISH = {
  paymentService: 4181,
  paymentControls: 4182,
  mailPage: 4183,
  oneTimeCodes: 4184,
  smtp: 4185,
  database: 4186,
};

const canListen = (port, host) =>
  new Promise((resolve) => {
    const server = createServer();
    server.once('error', (error) => resolve(error.code === 'EAFNOSUPPORT' || error.code === 'EADDRNOTAVAIL'));
    server.listen({ port, host }, () => server.close(() => resolve(true)));
  });

/** Free means free for everybody: on loopback and on every address of the machine. */
export async function isPortFree(port) {
  return (
    (await canListen(port, '127.0.0.1')) &&
    (await canListen(port, '0.0.0.0')) &&
    (await canListen(port, '::'))
  );
}

/** The first port from `wish` upward that `isFree` says yes to and that is not `taken` already. */
export async function choosePort(wish, { taken = new Set(), isFree = isPortFree } = {}) {
  for (let port = wish; port <= Math.min(wish + 500, 65_535); port += 1) {
    if (taken.has(port) || !(await isFree(port))) continue;
    taken.add(port);
    return port;
  }
  throw new StartFault(`No free port was found from ${wish} upward.`);
}

/** @returns {{ port: number, moved: boolean }} the site's port; `moved` when the usual one was taken */
export async function chooseSitePort(asked, { isFree = isPortFree } = {}) {
  if (asked === undefined) {
    const port = await choosePort(DEFAULT_PORT, { isFree });
    return { port, moved: port !== DEFAULT_PORT };
  }
  if (!(await isFree(asked))) {
    throw new StartFault(
      `Port ${asked} is taken by another program. Give a free one in PORT, or leave PORT out.`,
    );
  }
  return { port: asked, moved: false };
}

function readPorts(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return {};
  }
}

/** Ports for the named stand-ins: those of the last start where they are still free. */
export async function rememberPorts(file, names, sitePort, { isFree = isPortFree } = {}) {
  const known = readPorts(file);
  const taken = new Set([sitePort]);
  const ports = {};
  for (const name of names) {
    const last = Number.isSafeInteger(known[name]) ? known[name] : FIRST_WISH[name];
    ports[name] = await choosePort(last, { taken, isFree });
  }
  writeFileSync(file, `${JSON.stringify({ ...known, ...ports }, null, 2)}\n`);
  return ports;
}
