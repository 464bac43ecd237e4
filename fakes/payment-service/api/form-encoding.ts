// Reads form-encoded parameters: every value arrives as text, and every fault names its parameter as the caller wrote it.
import { z } from 'zod';
import { invalid } from './api-errors.ts';
import type { ApiError } from './api-errors.ts';

export const text = (max = 5000) => z.string().min(1).max(max);
export const integer = z
  .string()
  .regex(/^-?\d{1,15}$/)
  .transform(Number);
export const truth = z.enum(['true', 'false']).transform((value) => value === 'true');

const NOT_AN_ADDRESS = 'Not a valid URL';
const isWebAddress = (value: string): boolean =>
  URL.canParse(value) && ['http:', 'https:'].includes(new URL(value).protocol);
export const webAddress = text().refine(isWebAddress, NOT_AN_ADDRESS);

/** An empty value clears its key, so in a new object it is a key that never was. */
export const metadata = z
  .record(z.string().min(1).max(40), z.string().max(500))
  .refine((pairs) => Object.keys(pairs).length <= 50, 'You can only have up to 50 metadata keys.')
  .transform((pairs) => Object.fromEntries(Object.entries(pairs).filter(([, value]) => value !== '')));

export const created = z.union([
  integer.transform((at) => ({ gte: at, lte: at })),
  z.strictObject({ gt: integer, gte: integer, lt: integer, lte: integer }).partial(),
]);
type Window = { gt?: number; gte?: number; lt?: number; lte?: number };
export const isWithin = (at: number, window: Window = {}): boolean =>
  at > (window.gt ?? -Infinity) &&
  at >= (window.gte ?? -Infinity) &&
  at < (window.lt ?? Infinity) &&
  at <= (window.lte ?? Infinity);

const nameOf = (path: readonly PropertyKey[]): string =>
  path.map((part, index) => (index === 0 ? String(part) : `[${String(part)}]`)).join('');

function valueAt(input: unknown, path: readonly PropertyKey[]): unknown {
  return path.reduce<unknown>((value, part) => {
    const step = z.record(z.string(), z.unknown()).or(z.array(z.unknown())).safeParse(value);
    return step.success ? Object.entries(step.data).find(([key]) => key === String(part))?.[1] : undefined;
  }, input);
}

function emptyFault(param: string): ApiError {
  const message = `You passed an empty string for '${param}'. We assume empty values are an attempt to unset a parameter; however '${param}' cannot be unset. You should remove '${param}' from your request or supply a non-empty value.`;
  return invalid(message, { code: 'parameter_invalid_empty', param });
}

function toApiError(issue: z.core.$ZodIssue, input: unknown): ApiError {
  if (issue.code === 'unrecognized_keys') {
    const param = nameOf([...issue.path, ...issue.keys.slice(0, 1)]);
    return invalid(`Received unknown parameter: ${param}`, { code: 'parameter_unknown', param });
  }
  const param = nameOf(issue.path);
  const value = valueAt(input, issue.path);
  const given = typeof value === 'string' ? value : 'not a single value';
  if (value === undefined)
    return invalid(`Missing required param: ${param}.`, { code: 'parameter_missing', param });
  if (value === '') return emptyFault(param);
  if (issue.code === 'invalid_format' && issue.format === 'email')
    return invalid(`Invalid email address: ${given}`, { code: 'email_invalid', param });
  if (issue.code === 'invalid_format')
    return invalid(`Invalid integer: ${given}`, { code: 'parameter_invalid_integer', param });
  if (issue.message === NOT_AN_ADDRESS) return invalid(NOT_AN_ADDRESS, { code: 'url_invalid', param });
  return invalid(`Invalid ${param}: ${issue.message}`, { param });
}

/** @throws ApiError for the first fault, as the service does. */
export function readParams<T>(schema: z.ZodType<T>, input: unknown): T {
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  const [first] = parsed.error.issues;
  throw first ? toApiError(first, input) : invalid('Invalid request.');
}
