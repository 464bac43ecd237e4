// The few kinds of error a border answers with; status and code come from the class.
import type { ErrorCode, FieldFaults } from '#shared/errors.ts';

type Extra = { reason?: string; fields?: FieldFaults; retryAfterSeconds?: number };

export class AppError extends Error {
  override name = 'AppError';
  constructor(
    readonly status: number,
    readonly code: ErrorCode,
    message: string,
    readonly extra: Extra = {},
  ) {
    super(message);
  }
}

export class Invalid extends AppError {
  constructor(fields: FieldFaults, message = 'Some answers need putting right.') {
    super(400, 'invalid', message, { fields });
  }
}
export class NotSignedIn extends AppError {
  constructor(message = 'Sign in at the desk first.') {
    super(401, 'not-signed-in', message);
  }
}
export class NotAllowed extends AppError {
  constructor(message = 'Your roles do not open this.', reason?: string) {
    super(403, 'not-allowed', message, reason ? { reason } : {});
  }
}
export class NotFound extends AppError {
  constructor(message = 'There is nothing at this address.') {
    super(404, 'not-found', message);
  }
}
export class Conflict extends AppError {
  constructor(message: string, reason?: string) {
    super(409, 'conflict', message, reason ? { reason } : {});
  }
}
export class Refused extends AppError {
  constructor(message: string, reason: string) {
    super(422, 'refused', message, { reason });
  }
}
export class TooMany extends AppError {
  constructor(retryAfterSeconds: number, message = 'Too many tries from here. Wait a little and try again.') {
    super(429, 'too-many', message, { retryAfterSeconds });
  }
}
export class Upstream extends AppError {
  constructor(message = 'The card service did not answer. Nothing was taken. Try again in a minute.') {
    super(502, 'upstream', message);
  }
}
