// What went wrong on a page, in one plain shape that can also be sent from the server to the browser.
import { isRouteErrorResponse } from 'react-router-dom';
import { problemSchema } from '#shared/errors.ts';
import { ApiProblem, NoAnswer } from './api.ts';

export type PageFault = {
  kind: 'not-found' | 'no-answer' | 'refused' | 'fault';
  status: number;
  detail: string | null;
  requestId: string | null;
};

const kindOf = (status: number): PageFault['kind'] =>
  status === 404 || status === 405 ? 'not-found' : status < 500 ? 'refused' : 'fault';

export function toPageFault(error: unknown): PageFault {
  if (error instanceof NoAnswer) return { kind: 'no-answer', status: 0, detail: null, requestId: null };
  const data: unknown =
    error instanceof ApiProblem ? error.problem : isRouteErrorResponse(error) ? error.data : undefined;
  const problem = problemSchema.partial().safeParse(data);
  const said = problem.success ? problem.data : {};
  const status = isRouteErrorResponse(error) ? error.status : (said.status ?? 500);
  // What a fault of ours says of itself is for the log, not for the reader.
  const detail = status < 500 || status === 503 ? (said.detail ?? null) : null;
  return { kind: kindOf(status), status, detail, requestId: said.requestId ?? null };
}

/** The same fault as the router can carry it in the page's state. */
export const toRouteError = (error: unknown, requestId: string | null) => {
  const fault = toPageFault(error);
  const id = fault.requestId ?? (fault.kind === 'fault' ? requestId : null);
  return {
    status: fault.status,
    statusText: '',
    internal: false,
    data: { ...(fault.detail !== null && { detail: fault.detail }), ...(id !== null && { requestId: id }) },
  };
};

/** Thrown by a loader where nothing stands at the address. */
export const nothingHere = (): Response => new Response(null, { status: 404 });
