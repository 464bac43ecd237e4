// The pages as the server draws them: whole without scripts, allowed by the policy, safe to embed.
import { describe, expect, it } from 'vitest';
import { render, type RenderedPage } from '#src/entry-server.tsx';
import type { Campaign } from '#shared/campaign/campaign-schemas.ts';
import { lampwoman, SOCIETY } from './lampwoman.ts';

const NOT_FOUND = { type: 'about:blank', title: 'Not found', status: 404, code: 'not-found' };

async function draw(path: string, campaign: Campaign = lampwoman()): Promise<RenderedPage> {
  const answers: Record<string, unknown> = { '/api/campaign': campaign, '/api/society': SOCIETY };
  const page = await render(new Request(`http://site.example${path}`), (question) => {
    const answer = answers[question.path];
    return Promise.resolve({
      status: answer ? 200 : 404,
      text: JSON.stringify(answer ?? NOT_FOUND),
    });
  });
  if (page instanceof Response) throw new Error(`${path} turned away`);
  return page;
}

/** React marks where one text ends and the next begins; a reader does not see it. */
const bare = (html: string): string => html.replaceAll('<!-- -->', '');
/** Not the whole page in the report of a failure. */
const holds = (html: string, words: string): void =>
  expect(bare(html).includes(words), `the page holds ${words}`).toBe(true);

describe('the home page', () => {
  it('holds figure, sums, every part and the changed date in its HTML', async () => {
    const { html, status, head } = await draw('/');
    expect(status).toBe(200);
    expect(head).toBe('<title>The Lampwoman. Brackenhythe Heritage Society</title>');
    const links = [...html.matchAll(/<a id="figure-([a-z-]+)"[^>]*href="\/parts\/([a-z-]+)"/g)];
    expect(links.map(([, slug]) => slug)).toEqual(lampwoman().parts.map(({ slug }) => slug));
    holds(html, '<b>£41,280 given.</b>');
    holds(html, 'It builds her to the elbow.');
    expect(html).toMatch(/<del>.*25 June 2027.*<\/del>/);
    holds(html, 'Two oak butts split.');
    holds(html, 'href="/give?towards=panes"');
    expect(html).not.toContain('href="/give?towards=footing"');
  });

  it('has nothing that the security policy refuses', async () => {
    for (const path of ['/', '/parts/panes', '/promise', '/nowhere']) {
      const { html } = await draw(path);
      expect(html, path).not.toMatch(/<script|<style|\sstyle=|\son[a-z]+="/);
    }
  });

  it('opens the card of a part at its own address', async () => {
    const { html, head } = await draw('/parts/panes', lampwoman({ meantPounds: { panes: 225 } }));
    expect(head).toContain('The 24 panes. The Lampwoman.');
    expect(html).toMatch(/part-card[^]*£14,175[^]*Give to it/);
    expect((await draw('/')).html).not.toContain('part-card');
  });

  it('tells what is met in kind, what waits for higher parts, and what adds no height', async () => {
    const { html } = await draw(
      '/',
      lampwoman({ inKindPounds: { 'lantern-frame': 600 }, meantPounds: { panes: 225 }, withLifting: true }),
    );
    holds(html, '£600 met by Thornquay Plate in kind');
    holds(html, '£225</span> of what is given is meant for parts above the ');
    holds(html, ', which is being paid for now. It lifts the line');
    holds(html, 'after the shoulders');
  });

  it('says 404 where there is no such part and no such page, inside the masthead', async () => {
    for (const path of ['/parts/nose', '/nowhere']) {
      const page = await draw(path);
      expect(page.status, path).toBe(404);
      expect(page.head).toBe('<title>Nothing stands here</title>');
      holds(page.html, 'class="masthead"');
      expect(page.faults).toEqual([]);
    }
  });

  it('cannot be broken out of by a text in its data', async () => {
    const nasty = '</script><script>alert(1)</script>';
    const { html, state } = await draw('/', { ...lampwoman(), lead: nasty });
    expect(html).not.toContain('<script>');
    expect(state).not.toContain('<');
    expect(JSON.parse(state)).toMatchObject({ query: { queries: expect.any(Array) as unknown[] } });
  });

  it('shows no more than a request number when the API fails', async () => {
    const page = await render(
      new Request('http://site.example/', { headers: { 'x-request-id': 'r-17' } }),
      () => Promise.resolve({ status: 500, text: 'stack at line 3' }),
    );
    if (page instanceof Response) throw new Error('turned away');
    expect(page.status).toBe(500);
    holds(page.html, 'r-17');
    expect(page.html).not.toContain('stack at line 3');
  });
});
