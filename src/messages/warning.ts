/**
 * Something the user should know about a result that was still computed.
 * `message` states cause, consequence and remedy; `about` is a band label or the key of a constant.
 */
export interface Warning {
  readonly code: string;
  readonly message: string;
  readonly about?: string;
}
