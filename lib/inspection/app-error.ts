/** The closed set of reasons for which a request is not carried out. */
export const errorCodes = {
  'sign-in-needed': { status: 401, sentence: 'Sign in to go on. What you had entered is kept.' },
  'not-found': { status: 404, sentence: 'There is nothing here that you can see.' },
  'not-allowed': { status: 403, sentence: 'Your role in this project does not allow this.' },
  invalid: { status: 400, sentence: 'Something entered cannot be used. See the fields named.' },
  held: { status: 409, sentence: 'Something stands in the way. See the holds.' },
  conflict: { status: 409, sentence: 'Somebody changed this meanwhile. Load it again and look.' },
  'too-large': { status: 413, sentence: 'That is more than can be taken at once.' },
  'too-many': { status: 429, sentence: 'Too many tries. Wait a little and try again.' },
  'wrong-password': { status: 403, sentence: 'That password is not right. Nothing was signed.' },
  internal: {
    status: 500,
    sentence: 'Something went wrong on the server. What you sent was not carried out.',
  },
} as const;
export type ErrorCode = keyof typeof errorCodes;

export interface FieldProblem {
  path: string;
  message: string;
}

/** The one error type: a code of the closed set, a sentence for people, and the fields it is about. */
export class AppError extends Error {
  readonly code: ErrorCode;
  readonly fields: FieldProblem[];
  readonly detail: unknown;

  constructor(
    code: ErrorCode,
    sentence: string = errorCodes[code].sentence,
    more: { fields?: FieldProblem[]; detail?: unknown } = {},
  ) {
    super(sentence);
    this.name = 'AppError';
    this.code = code;
    this.fields = more.fields ?? [];
    this.detail = more.detail;
  }

  get status(): number {
    return errorCodes[this.code].status;
  }
}
