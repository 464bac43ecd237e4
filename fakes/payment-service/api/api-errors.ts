// The errors that the API answers with: always a body with the key `error`, since the SDK judges by that alone.

export type ErrorBody = {
  type: 'invalid_request_error' | 'idempotency_error' | 'api_error';
  message: string;
  code?: string;
  param?: string;
  doc_url?: string;
};

export class ApiError extends Error {
  override name = 'ApiError';
  constructor(
    readonly status: number,
    readonly body: ErrorBody,
  ) {
    super(body.message);
  }
}

const docs = (code: string) => `https://stripe.com/docs/error-codes/${code.replaceAll('_', '-')}`;

export function invalid(message: string, detail: { code?: string; param?: string } = {}): ApiError {
  const doc = detail.code ? { doc_url: docs(detail.code) } : {};
  return new ApiError(400, { type: 'invalid_request_error', message, ...detail, ...doc });
}

/** The object of the address is not there. */
export const missing = (noun: string, id: string): ApiError =>
  new ApiError(404, { ...unknownReference(noun, id, 'id').body });

/** An object that a parameter names is not there. */
export const unknownReference = (noun: string, id: string, param: string): ApiError =>
  invalid(`No such ${noun}: '${id}'`, { code: 'resource_missing', param });

export const unknownAddress = (method: string, path: string): ApiError =>
  new ApiError(404, {
    type: 'invalid_request_error',
    message: `Unrecognized request URL (${method}: ${path}).`,
  });

export const brokenInside = (): ApiError =>
  new ApiError(500, { type: 'api_error', message: 'An unknown error occurred inside the payment stand-in.' });
