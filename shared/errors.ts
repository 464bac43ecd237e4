// The closed list of what can go wrong at a border, and its wire shape: RFC 9457 problem details.
import { z } from 'zod';

export const ERROR_CODES = [
  'invalid',
  'not-signed-in',
  'not-allowed',
  'not-found',
  'conflict',
  'refused',
  'too-many',
  'upstream',
  'unavailable',
  'internal',
] as const;
export type ErrorCode = (typeof ERROR_CODES)[number];

/** `fields` names every wrong field by its path, each with words that say what to do. */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string().optional(),
  instance: z.string().optional(),
  code: z.enum(ERROR_CODES),
  reason: z.string().optional(),
  fields: z.record(z.string(), z.string()).optional(),
  requestId: z.string().optional(),
});
export type Problem = z.infer<typeof problemSchema>;
export type FieldFaults = Record<string, string>;

/** Every issue of a failed parse, by field path; the first word on a field stands. */
export function fieldFaults(error: z.ZodError): FieldFaults {
  const faults: FieldFaults = {};
  for (const issue of error.issues) {
    const names =
      issue.code === 'unrecognized_keys'
        ? issue.keys.map(
            (key) => [[...issue.path, key].join('.'), 'This is not asked for here. Leave it out.'] as const,
          )
        : [[issue.path.join('.'), issue.message] as const];
    for (const [name, words] of names) faults[name] ??= words;
  }
  return faults;
}
