// Draws one page on the server: its HTML, its head, its status, and the state from which the browser goes on.
import { PassThrough } from 'node:stream';
import { text } from 'node:stream/consumers';
import type { ReactNode } from 'react';
import { renderToPipeableStream } from 'react-dom/server';
import { dehydrate, type QueryClient } from '@tanstack/react-query';
import {
  createStaticHandler,
  createStaticRouter,
  StaticRouterProvider,
  type StaticHandlerContext,
} from 'react-router-dom';
import { escapeHtml } from '#shared/html-text.ts';
import type { Society } from '#shared/society/society-schemas.ts';
import { faultTitle } from './app/FaultPage.tsx';
import { createRoutes } from './app/router.tsx';
import { Site } from './app/Site.tsx';
import { giveRoutes } from './giving/give-routes.tsx';
import { ApiProblem } from './lib/api.ts';
import { createApi, type Exchange } from './lib/create-api.ts';
import { toRouteError } from './lib/page-fault.ts';
import { writePageState } from './lib/page-state.ts';
import { createQueryClient } from './lib/query-client.ts';
import { titleOf } from './lib/route-handle.ts';
import { SOCIETY_KEY } from './society/society-queries.ts';

export type RenderedPage = { status: number; html: string; head: string; state: string; faults: unknown[] };

/** Whole before it is sent: with boundaries streamed one by one, React would need an inline script. */
async function drawWhole(page: ReactNode): Promise<string> {
  const out = new PassThrough();
  const drawn = new Promise<void>((resolve, reject) => {
    const stream = renderToPipeableStream(page, {
      progressiveChunkSize: Number.POSITIVE_INFINITY,
      onAllReady: () => {
        stream.pipe(out);
        resolve();
      },
      onShellError: reject,
    });
  });
  await drawn;
  return text(out);
}

function headOf(context: StaticHandlerContext, queryClient: QueryClient, errors: unknown[]): string {
  const society = queryClient.getQueryData<Society>(SOCIETY_KEY);
  const matches = context.matches.map(({ route }) => ({
    handle: route.handle as unknown,
    loaderData: context.loaderData[route.id] as unknown,
  }));
  const title = errors.length > 0 ? faultTitle(errors[0]) : titleOf(matches, society?.name ?? 'Treenail');
  return `<title>${escapeHtml(title)}</title>`;
}

export async function render(request: Request, exchange: Exchange): Promise<Response | RenderedPage> {
  const queryClient = createQueryClient({ mayRetry: false });
  const api = createApi(exchange);
  const routeContext = { queryClient, api };
  const handler = createStaticHandler(createRoutes(routeContext, giveRoutes(routeContext)));
  const context = await handler.query(request);
  if (context instanceof Response) return context;

  const thrown = Object.values(context.errors ?? {}) as unknown[];
  // What the API refused it has logged itself.
  const faults = thrown.filter((fault) => fault instanceof Error && !(fault instanceof ApiProblem));
  const requestId = request.headers.get('x-request-id');
  const routeErrors = thrown.map((fault) => toRouteError(fault, requestId));
  const errors =
    context.errors &&
    Object.fromEntries(Object.keys(context.errors).map((id, index) => [id, routeErrors[index]]));
  const drawn = { ...context, errors };
  const query = dehydrate(queryClient);
  const html = await drawWhole(
    <Site queryClient={queryClient} api={api} query={query}>
      <StaticRouterProvider
        router={createStaticRouter(handler.dataRoutes, drawn)}
        context={drawn}
        hydrate={false}
      />
    </Site>,
  );
  const head = headOf(context, queryClient, routeErrors);
  queryClient.clear();
  const { loaderData, actionData } = context;
  const state = writePageState({ router: { loaderData, actionData, errors }, query });
  return { status: routeErrors[0]?.status || context.statusCode, html, head, state, faults };
}
