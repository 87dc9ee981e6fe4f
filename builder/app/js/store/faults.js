/**
 * What can go wrong while storing, as a small closed list. The words for people stand in
 * words/<language>.yaml under `store`, one entry per code.
 */

/** @typedef {'full'|'aborted'|'lost'|'conflict'|'blocked'|'newer'|'none'|'torn'|'probes'|'unread'|'too_large'|'not_ours'} FaultCode */

/** A storage fault with a code that the words file knows. */
export class Fault extends Error {
  /**
   * @param {FaultCode} code
   * @param {{cause?: unknown, stored?: object}} [more]  `stored`: on a conflict, what is stored
   */
  constructor(code, more = {}) {
    super(`store: ${code}`, { cause: more.cause });
    this.name = 'Fault';
    this.code = code;
    this.stored = more.stored ?? null;
  }
}

const CODES = {
  QuotaExceededError: 'full',
  AbortError: 'aborted',
  InvalidStateError: 'lost',
  TransactionInactiveError: 'lost',
  UnknownError: 'lost',
  VersionError: 'newer',
  SecurityError: 'none',
  NotSupportedError: 'none',
};

/**
 * Any error of IndexedDB as a Fault. A full phone may abort without naming the quota, so an abort
 * without a cause is told as "not saved", never as success.
 *
 * @param {unknown} error
 * @returns {Fault}
 */
export function faultOf(error) {
  if (error instanceof Fault) return error;
  return new Fault(CODES[error?.name] ?? 'aborted', { cause: error });
}
