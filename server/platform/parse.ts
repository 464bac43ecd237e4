// Parses what comes in; every wrong field is named in one answer.
import type { z } from 'zod';
import { fieldFaults } from '#shared/errors.ts';
import { Invalid } from './errors.ts';

/** @throws Invalid with all issues of the input, each by its field path. */
export function parse<T>(schema: z.ZodType<T>, input: unknown): T {
  const parsed = schema.safeParse(input);
  if (!parsed.success) throw new Invalid(fieldFaults(parsed.error));
  return parsed.data;
}
