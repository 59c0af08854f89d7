/** One place in the input and what is wrong with it. */
export interface InputError {
  /** Dotted path, empty for the whole. */
  readonly path: string;
  readonly message: string;
}

/** An error meant for the caller: `message` says what is wrong and what to do. */
export class AppError extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
    readonly extra: {
      readonly errors?: readonly InputError[];
      readonly members?: Readonly<Record<string, unknown>>;
      readonly headers?: Readonly<Record<string, string>>;
    } = {},
    options?: ErrorOptions,
  ) {
    super(message, options);
    this.name = 'AppError';
  }
}

/** Not there, or in another gym: the two are told alike. */
export const notFound = (what = 'That') =>
  new AppError(
    404,
    'not-found',
    `${what} is not here. It may have been removed, or the address is mistyped.`,
  );
export const notSignedIn = () => new AppError(401, 'not-signed-in', 'Please sign in and try again.');
export const forbidden = (message = 'Your role does not allow this. Ask the owner of your gym.') =>
  new AppError(403, 'forbidden', message);
/** The state of things does not allow it now. */
export const conflict = (code: string, message: string, members?: Readonly<Record<string, unknown>>) =>
  new AppError(409, code, message, members ? { members } : {});
/** Well-formed, but a rule refuses it. */
export const refused = (code: string, message: string, errors?: readonly InputError[]) =>
  new AppError(422, code, message, errors ? { errors } : {});
export const malformed = (errors: readonly InputError[]) =>
  new AppError(
    400,
    'bad-input',
    errors.length === 1 && errors[0]
      ? errors[0].message
      : 'Some of what was sent is not right; see each field.',
    { errors },
  );
