export interface FieldIssue {
  path: string;
  message: string;
}

/** A refusal: a code for programs, a sentence for the person, and one for the log where they differ. */
export class AppError extends Error {
  constructor(
    readonly code: string,
    readonly status: number,
    /** For the person. */
    readonly sentence: string,
    readonly more: { log?: string; fields?: FieldIssue[] } = {},
  ) {
    super(more.log ?? sentence);
    this.name = 'AppError';
  }
}

export const notSignedIn = () => new AppError('NOT_SIGNED_IN', 401, 'Sign in to go on.');

export const notAllowed = (reason: string) => new AppError('NOT_ALLOWED', 403, reason);

export const notFound = (what: string) => new AppError('NOT_FOUND', 404, `${what} was not found.`);

export const badRequest = (sentence: string, fields: FieldIssue[] = []) =>
  new AppError('BAD_REQUEST', 422, sentence, { fields });

export const conflict = (code: string, sentence: string) => new AppError(code, 409, sentence);
