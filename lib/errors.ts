/** A refusal that is part of the plan. The message is read by the person who asked. */
export class Denied extends Error {
  constructor(
    readonly code: 'signed_out' | 'not_allowed' | 'too_many' | 'conflict' | 'too_large' | 'bad_request' | 'busy',
    message: string,
    readonly retryAfterSeconds?: number,
  ) {
    super(message);
  }
}

/**
 * The thing does not exist or is out of this viewer's reach: the two look the same from outside.
 * `orderNumber` is what was asked for, so that a refusal of a known build can be written down.
 */
export class OutOfReach extends Error {
  constructor(readonly orderNumber?: string) {
    super('out of reach');
  }
}

/** Input that a person can mend: one sentence for each field. */
export class BadInput extends Error {
  constructor(readonly fields: Record<string, string>) {
    super('bad input');
  }
}
