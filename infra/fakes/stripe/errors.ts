/** An answer of the API that is not a success, in its own form. */
export class ApiError extends Error {
  constructor(
    readonly status: number,
    readonly body: Record<string, unknown>,
  ) {
    super(String(body.message));
  }
}

export function invalid(message: string, code?: string, param?: string): ApiError {
  return new ApiError(400, { type: 'invalid_request_error', message, code, param });
}

export function missing(param: string): ApiError {
  return invalid(`Missing required param: ${param}.`, 'parameter_missing', param);
}

export function noSuch(kind: string, id: string): ApiError {
  return new ApiError(404, {
    type: 'invalid_request_error',
    code: 'resource_missing',
    message: `No such ${kind}: '${id}'`,
    param: kind,
  });
}
