// Makes the Api from any way of exchanging one request for one answer: fetch in the browser, in process on the server.
import type { z } from 'zod';
import { problemSchema, type Problem } from '#shared/errors.ts';
import { ApiProblem, type Api } from './api.ts';

export type Question = {
  method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  path: string;
  /** Sent as JSON when there is one. */
  body?: unknown;
  signal?: AbortSignal | undefined;
};
export type Answer = { status: number; text: string };
export type Exchange = (question: Question) => Promise<Answer>;

function readJson(text: string): unknown {
  if (text === '') return undefined;
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

/** A proxy in between may answer for us, in words that are not ours. */
function readProblem({ status, text }: Answer): Problem {
  const parsed = problemSchema.safeParse(readJson(text));
  if (parsed.success) return parsed.data;
  const code = status === 404 ? 'not-found' : status >= 500 ? 'unavailable' : 'invalid';
  return { type: 'about:blank', title: 'No proper answer came', status, code };
}

export function createApi(exchange: Exchange): Api {
  async function ask<T>(schema: z.ZodType<T>, question: Question): Promise<T> {
    const answer = await exchange(question);
    if (answer.status >= 400) throw new ApiProblem(readProblem(answer));
    return schema.parse(readJson(answer.text));
  }
  return {
    get: (schema, path, signal) => ask(schema, { method: 'GET', path, signal }),
    send: (schema, path, { method = 'POST', body, signal } = {}) =>
      ask(schema, { method, path, body, signal }),
  };
}
