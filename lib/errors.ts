export type ErrorCode = 'not_found' | 'forbidden' | 'conflict' | 'invalid' | 'too_many';

/** Messages by form field name, as the person reads them. */
export type FieldMessages = Record<string, string[] | undefined>;

/** Something a person can put right. Anything else that is thrown is a bug and must crash loudly. */
export class AppError extends Error {
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly fields: FieldMessages = {},
  ) {
    super(message);
    this.name = 'AppError';
  }
}

/** Missing and foreign records answer alike, so that nobody learns what exists. */
export const notFound = (what: string) => new AppError('not_found', `This ${what} was not found.`);
