// Counts the seconds down and fetches the new codes in place, so that nobody has to reload.
/* global document, DOMParser */
const STEP_SECONDS = 30;
const seconds = document.querySelector('#seconds');

const readLeft = () => STEP_SECONDS - (Math.floor(Date.now() / 1000) % STEP_SECONDS);

async function renew() {
  const answer = await fetch('/', { cache: 'no-store' });
  const fresh = new DOMParser().parseFromString(await answer.text(), 'text/html').querySelector('#codes');
  if (fresh) document.querySelector('#codes')?.replaceWith(fresh);
}

let last = readLeft();
const tick = () => {
  const left = readLeft();
  if (seconds) seconds.textContent = String(left);
  // The stand-in may have been stopped; the next step tries again.
  if (left > last) renew().catch(() => undefined);
  last = left;
};
if (seconds) setInterval(tick, 250);
