/** S3's error codes with their HTTP status, as the Amazon S3 API reference lists them. */
const statusOf = {
  AccessDenied: 403,
  AuthorizationHeaderMalformed: 400,
  AuthorizationQueryParametersError: 400,
  BadDigest: 400,
  BucketAlreadyOwnedByYou: 409,
  EntityTooLarge: 400,
  IncompleteBody: 400,
  InternalError: 500,
  InvalidAccessKeyId: 403,
  InvalidArgument: 400,
  InvalidBucketName: 400,
  InvalidRange: 416,
  InvalidRequest: 400,
  KeyTooLongError: 400,
  MethodNotAllowed: 405,
  MissingContentLength: 411,
  NoSuchBucket: 404,
  NoSuchKey: 404,
  NotImplemented: 501,
  PreconditionFailed: 412,
  RequestTimeTooSkewed: 403,
  SignatureDoesNotMatch: 403,
  XAmzContentSHA256Mismatch: 400,
} as const;

export type S3ErrorCode = keyof typeof statusOf;

export class S3Error extends Error {
  readonly status: number;

  constructor(
    readonly code: S3ErrorCode,
    message: string,
    readonly detail: Record<string, string> = {},
  ) {
    super(message);
    this.status = statusOf[code];
  }
}
