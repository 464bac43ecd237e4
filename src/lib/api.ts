// The one way to ask the API: in the browser over HTTP, on the server in process. Every answer is parsed.
import type { z } from 'zod';
import type { Problem } from '#shared/errors.ts';

export type SendOptions = {
  method?: 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  body?: unknown;
  signal?: AbortSignal;
};

export type Api = {
  get<T>(schema: z.ZodType<T>, path: string, signal?: AbortSignal): Promise<T>;
  send<T>(schema: z.ZodType<T>, path: string, options?: SendOptions): Promise<T>;
};

/** The API said no; `problem.fields` names every wrong field. */
export class ApiProblem extends Error {
  override name = 'ApiProblem';
  constructor(readonly problem: Problem) {
    super(problem.detail ?? problem.title);
  }
}

/** No answer came at all: the connection is lost, and nothing is known of what happened. */
export class NoAnswer extends Error {
  override name = 'NoAnswer';
}
