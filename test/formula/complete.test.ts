/** Completion: what is offered at the caret, in which order, and what taking it makes of the entry. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { completionsAt, type Completion } from '../../src/formula';

const SYMBOLS = [
  { symbol: 'P_tx', label: 'Transmit power' },
  { symbol: 'P_rx', label: 'Received power' },
  { symbol: 'p', label: '' },
  { symbol: 'λ_0', label: 'Wavelength' },
  { symbol: 'rx.nf', label: 'Noise figure of the chain' },
  { symbol: '', label: 'a line without a symbol' },
];

/** The entry with `|` for the caret. */
const at = (marked: string): readonly Completion[] =>
  completionsAt(marked.replace('|', ''), marked.indexOf('|'), SYMBOLS);

/** The entry, with the caret marked, after taking a completion. */
function taken(marked: string, text: string): string {
  const entry = marked.replace('|', '');
  const completion = at(marked).find((one) => one.text === text);
  if (completion === undefined) return 'not offered';
  const next = entry.slice(0, completion.replace.start) + completion.insert + entry.slice(completion.replace.end);
  return `${next.slice(0, completion.caretAfter)}|${next.slice(completion.caretAfter)}`;
}

describe('taking a completion', () => {
  it.each([
    ['P_|', 'P_tx', 'P_tx|'],
    ['3*P_t| + 1 dB', 'P_tx', '3*P_tx| + 1 dB'],
    ['pow|', 'powersum', 'powersum(|)'],
    ['pow|(N, I)', 'powersum', 'powersum(|N, I)'],
    ['k|', 'k_B', 'k_B|'],
    ['10 db|', 'dBm', '10 dBm|'],
    ['10 dBu|', 'dBµV', '10 dBµV|'],
    ['10 u|', 'µW', '10 µW|'],
    ['10M|', 'MHz', '10MHz|'],
    ['2.5e3 M|', 'MHz', '2.5e3 MHz|'],
    ['P_tx - 3 d|', 'dB', 'P_tx - 3 dB|'],
    ['λ|', 'λ_0', 'λ_0|'],
    ['rx.|', 'rx.nf', 'rx.nf|'],
    ['f(P_|, 3)', 'P_rx', 'f(P_rx|, 3)'],
    ['loss|', 'free_space_loss', 'free_space_loss(|)'],
  ])('%s with %s: %s', (marked, text, expected) => {
    expect(taken(marked, text)).toBe(expected);
  });
});

describe('what is offered', () => {
  it.each(['|', 'P_tx |', 'P_tx + |', '3|dB + (|', '"ver|', '(|'])('nothing at %s', (marked) => {
    expect(at(marked.replace('3|dB + (|', '3 dB + (|')).length).toBe(0);
  });

  it('units behind a number, the usual ones first, and nothing else', () => {
    const kinds = new Set(at('3 |').map(({ kind }) => kind));
    expect([...kinds]).toEqual(['unit']);
    expect(at('3 |').map(({ text }) => text)).toContain('dBm');
    expect(at('3 dB|')[0]?.text).toBe('dB');
  });

  it('symbols, constants and functions by their beginning, then by what they hold', () => {
    const texts = at('p|').map(({ text }) => text);
    expect(texts[0]).toBe('p');
    expect(texts.indexOf('pi')).toBeLessThan(texts.indexOf('P_tx'));
    expect(texts).toEqual(expect.arrayContaining(['P_tx', 'P_rx', 'powersum', 'pi', 'free_space_loss']));
    expect(texts).not.toContain('');
  });

  it('details: the label, the signature with its sentence, the unit’s description', () => {
    expect(at('P_t|')[0]?.detail).toBe('Transmit power');
    expect(at('thermal|')[0]?.detail).toMatch(/^thermal_noise\(T, B\) — .+\.$/);
    expect(at('3 dBm|')[0]?.detail).toContain('1 mW');
  });

  it('at most forty, each once, replacing the word before the caret', () => {
    fc.assert(
      fc.property(
        fc.string({
          maxLength: 12,
          unit: fc.constantFrom('P', '_', 't', 'x', '3', ' ', 'd', 'B', '(', '"', 'µ', 'λ', '.', '-'),
        }),
        fc.nat(12),
        (entry, where) => {
          const caret = Math.min(where, entry.length);
          const offered = completionsAt(entry, caret, SYMBOLS);
          expect(offered.length).toBeLessThanOrEqual(40);
          expect(new Set(offered.map(({ kind, text }) => `${kind} ${text}`)).size).toBe(offered.length);
          expect(
            offered.every(({ replace }) => replace.start >= 0 && replace.start <= caret && replace.end === caret),
          ).toBe(true);
        },
      ),
      { numRuns: 500 },
    );
  });
});
