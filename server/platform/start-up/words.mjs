// Everything the start-up says, in one place: progress lines, refusals, and the closing summary.

export function alreadyRunning({ pid, address }, data) {
  const where = address ? `at ${address}` : 'and is still starting';
  return (
    `Treenail is already running on the data folder ${data} (process ${pid}) ${where}.\n` +
    'Stop that copy with Ctrl-C first, or give another folder in TREENAIL_DATA to run a second one beside it.'
  );
}

export const portMoved = (usual, port) =>
  `port ${usual} is taken by another program, so the site is at port ${port}`;

export function howItEnded({ code, signal }) {
  return signal ? `was stopped by ${signal}` : `ended with exit code ${code}`;
}

export const died = (name, end, logFile) => `${name} ${howItEnded(end)}. Its last lines, from ${logFile}:`;

export function duration(ms) {
  if (ms < 950) return '';
  return ms < 60_000 ? ` (${(ms / 1000).toFixed(1)} s)` : ` (${Math.round(ms / 1000)} s)`;
}

/** Tells one step in one line: its name at once, what came of it when it is done. */
export function createTeller(write) {
  let isLineOpen = false;
  const say = (text) => {
    write(text);
    isLineOpen = !text.endsWith('\n');
  };
  const line = (text) => say(`${isLineOpen ? '\n' : ''}${text}\n`);
  async function step(name, work) {
    const began = Date.now();
    say(`${isLineOpen ? '\n' : ''}  ${name.padEnd(14)}`);
    const outcome = await work((word) => say(`${word} … `));
    say(`${isLineOpen ? '' : `  ${' '.repeat(14)}`}${outcome ?? 'done'}${duration(Date.now() - began)}\n`);
  }
  return { line, step };
}

const row = ([name, value]) => `  ${name.padEnd(26)}${value}`;

export function closingSummary({ isDemonstration, address, pages, signIns, logs }) {
  const lines = ['', `Treenail is ready${isDemonstration ? ', as a demonstration' : ''}.`, ''];
  lines.push(row(['The site', address]), ...pages.map(row));
  if (signIns) lines.push('', 'To sign in:', ...signIns.split('\n').map((text) => `  ${text}`));
  lines.push('', row(['Logs', logs]), row(['To stop', 'Ctrl-C']));
  return lines.join('\n');
}
