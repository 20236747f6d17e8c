import { describe, expect, it } from 'vitest';

import { conflictFault, faultFrom, missingFault, plainFault, unreadableFault } from '../../src/store/store-fault';

const named = (name: string, inner?: unknown): Error & { inner?: unknown } =>
  Object.assign(new Error(`${name} was thrown`), { name, inner });

describe('the fault that an error stands for', () => {
  it.each([
    ['a full disk, named outright', named('QuotaExceededError'), 'quota'],
    ['a full disk, inside an abort', named('AbortError', named('QuotaExceededError')), 'quota'],
    ['a full disk, two errors deep', named('BulkError', named('AbortError', named('QuotaExceededError'))), 'quota'],
    ['a full disk as the browser’s own exception', new DOMException('', 'QuotaExceededError'), 'quota'],
    ['a full disk as the cause', new Error('failed', { cause: named('QuotaExceededError') }), 'quota'],
    ['a full disk, met with a large text', new DOMException('Failed to write blobs (IOError)', 'DataError'), 'quota'],
    [
      'a full disk, met with a small text',
      new DOMException('Connection is closing because of: IO error: 000005.ldb: FILE_ERROR_NO_SPACE', 'UnknownError'),
      'quota',
    ],
    ['an abort for another reason', named('AbortError', named('UnknownError')), 'unexpected'],
    ['a value whose file is gone', named('NotReadableError'), 'unreadable'],
    ['a value that cannot be read back', named('UnknownError', named('DataError')), 'unreadable'],
    ['no database', named('MissingAPIError'), 'unavailable'],
    ['a forbidden database', named('OpenFailedError', named('SecurityError')), 'unavailable'],
    ['a closed connection', named('DatabaseClosedError'), 'unavailable'],
    ['an error nobody foresaw', named('TypeError'), 'unexpected'],
    ['something that is no error', 'oops', 'unexpected'],
    ['nothing', undefined, 'unexpected'],
  ])('%s', (_what, error, code) => {
    expect(faultFrom(error).code).toBe(code);
  });

  it('keeps the browser’s words of the whole chain as detail', () => {
    const fault = faultFrom(named('AbortError', named('QuotaExceededError')));
    expect(fault).toMatchObject({
      detail: 'AbortError: AbortError was thrown < QuotaExceededError: QuotaExceededError was thrown',
    });
  });

  it('is found for an error that wraps itself', () => {
    const error = named('AbortError');
    error.inner = error;
    expect(faultFrom(error).code).toBe('unexpected');
  });
});

describe('every fault', () => {
  const stored = {
    ...{ id: 'a', title: 'T', createdAt: 0, savedAt: 0, deletedAt: null, rev: 1, size: 1, lineCount: 1 },
    ...{ standing: 'usable' as const, text: 'x' },
  };
  it.each([
    plainFault('unavailable'),
    plainFault('quota'),
    plainFault('blocked'),
    plainFault('newer-format'),
    plainFault('unexpected'),
    missingFault('worksheet'),
    missingFault('trashed'),
    missingFault('copy'),
    unreadableFault(null),
    unreadableFault('x'),
    conflictFault(stored),
  ])('$code says in whole sentences what happened and what to do', ({ sentence }) => {
    expect(sentence).toMatch(/^[A-Z].*\.$/);
    expect(sentence).toMatch(/\b(Save|Close|Restore|Open|Choose|keep it again)\b/);
  });
});
