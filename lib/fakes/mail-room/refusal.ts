/** The error names of the Resend API this room answers with, and their HTTP status. */
const STATUS_OF = {
  missing_api_key: 401,
  invalid_api_key: 403,
  invalid_idempotency_key: 400,
  validation_error: 422,
  missing_required_field: 422,
  invalid_from_address: 422,
  invalid_attachment: 422,
  not_found: 404,
  method_not_allowed: 405,
  invalid_idempotent_request: 409,
  concurrent_idempotent_requests: 409,
  internal_server_error: 500,
} as const;

type RefusalName = keyof typeof STATUS_OF;

/** A request this room turns down, in the service's terms. */
export class Refusal extends Error {
  readonly status: number;

  constructor(
    readonly reason: RefusalName,
    message: string,
  ) {
    super(message);
    this.status = STATUS_OF[reason];
  }
}
