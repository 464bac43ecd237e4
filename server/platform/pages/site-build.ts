// The pages as Vite built them, or, while developing, as Vite makes them from the sources.
import { readFile } from 'node:fs/promises';
import type { Server } from 'node:http';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import express, { Router, type RequestHandler } from 'express';
import { z } from 'zod';

export type Exchange = (question: {
  method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  path: string;
  body?: unknown;
  signal?: AbortSignal | undefined;
}) => Promise<{ status: number; text: string }>;
export type RenderedPage = { status: number; html: string; head: string; state: string; faults: unknown[] };
export type Render = (request: Request, exchange: Exchange) => Promise<Response | RenderedPage>;

export type SiteBuild = {
  assets: RequestHandler;
  /** The template and the drawing function for one page. */
  open(url: string): Promise<{ template: string; render: Render }>;
  stop(): Promise<void>;
};

const ROOT = join(import.meta.dirname, '../../..');
const ENTRY = 'src/entry-server.tsx';
// The build is ours, made from src/ by the same commit: that it has the function is all that can be asked.
const moduleSchema = z.object({ render: z.custom<Render>((value) => typeof value === 'function') });

export async function openBuiltSite(root = ROOT): Promise<SiteBuild> {
  const client = join(root, 'dist/client');
  const template = await readFile(join(client, 'index.html'), 'utf8');
  const built: unknown = await import(pathToFileURL(join(root, 'dist/server/entry-server.js')).href);
  const { render } = moduleSchema.parse({ ...(built as object) });
  return {
    // Only what carries a hash in its name: the template beside it is no page and must be kept by nobody.
    assets: Router().use(
      '/assets',
      express.static(join(client, 'assets'), {
        index: false,
        redirect: false,
        immutable: true,
        maxAge: '1y',
      }),
    ),
    open: () => Promise.resolve({ template, render }),
    stop: () => Promise.resolve(),
  };
}

/** @param server the listening server, so that live reload shares its port */
export async function openLiveSite(server: Server | undefined, root = ROOT): Promise<SiteBuild> {
  const { createServer } = await import('vite');
  const vite = await createServer({
    root,
    appType: 'custom',
    server: { middlewareMode: true, ...(server && { hmr: { server } }) },
  });
  return {
    assets: vite.middlewares,
    async open(url) {
      const file = await readFile(join(root, 'index.html'), 'utf8');
      const template = await vite.transformIndexHtml(url, file);
      const loaded = await vite.ssrLoadModule(`/${ENTRY}`);
      return { template, render: moduleSchema.parse({ ...loaded }).render };
    },
    stop: () => vite.close(),
  };
}
