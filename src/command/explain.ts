/** `explain`: the working of a line, in words for a terminal. */
import { workingOf, type Piece, type Working } from '../review';
import type { Case } from '../worksheet';
import type { Answer, World } from './answer';
import { exitCodeOf } from './evaluate';
import { chooseCases, lineWithSymbol, openFile } from './open';
import { figureText } from './tables';

/** The working of a line in the chosen cases, with its findings. */
export function explainLine(file: string, symbol: string, wanted: readonly string[], world: World): Answer {
  const opened = openFile(file, world);
  const { evaluation } = opened;
  const line = lineWithSymbol(opened, symbol);
  const cases = chooseCases(opened, wanted);
  const findings = evaluation.findings(line.id).filter(({ caseIds }) => cases.some(({ id }) => caseIds.includes(id)));
  const workings = cases.flatMap((one) => {
    const working = workingOf(evaluation, line.id, one.id);
    return working === undefined ? [] : [writeWorking(working, one, figureText(working.reading.figure, line, true))];
  });
  const told = findings.map(
    ({ severity, code, message, accepted }) =>
      `${severity} ${code}: ${message}${accepted === undefined ? '' : ` Accepted: ${accepted}`}\n`,
  );
  const users = evaluation.usedBy(line.id).map((id) => evaluation.line(id)?.symbol || evaluation.line(id)?.label || id);
  const notes = [
    ...(line.source === undefined ? [] : [`source: ${line.source}\n`]),
    ...(line.note === undefined ? [] : [`note: ${line.note}\n`]),
    ...(users.length === 0 ? [] : [`used by: ${users.join(', ')}\n`]),
  ];
  return {
    results: [workings.join('\n'), ...told, ...notes].join(''),
    messages: opened.messages,
    exitCode: exitCodeOf({ evaluation, cases, lines: [line], findings }),
  };
}

const pieceText = (piece: Piece): string => {
  switch (piece.type) {
    case 'text':
      return piece.text;
    case 'symbol':
      return piece.symbol;
    case 'figure':
      return piece.unit === '' ? piece.text : `${piece.text} ${piece.unit}`;
  }
};

function writeWorking(working: Working, { name }: Case, result: string): string {
  const { symbol, label, steps, terms, shares, remarks, reading } = working;
  const lines = [`${symbol}${label === '' ? '' : ` — ${label}`}, ${name}: ${result}`];
  const width = Math.max(0, ...steps.map(({ title }) => title.length));
  for (const { title, pieces } of steps)
    if (title !== 'result') lines.push(`  ${title.padEnd(width)}  ${pieces.map(pieceText).join('')}`);
  if (terms.length > 0) {
    lines.push(shares ? '  contributions' : '  rests on');
    const names = Math.max(...terms.map((term) => term.symbol.length));
    const figures = Math.max(...terms.map(({ text, unit }) => `${text} ${unit}`.length));
    for (const term of terms) {
      const share = term.share === undefined ? '' : `${(term.share * 100).toFixed(1)} %`.padStart(9);
      lines.push(
        `    ${term.symbol.padEnd(names)}  ${`${term.text} ${term.unit}`.padStart(figures)}${share}  ${term.label}`.trimEnd(),
      );
    }
  }
  if (reading.requirement !== undefined) {
    const { bound, limit, met, margin, unit } = reading.requirement;
    lines.push(
      `  requirement: ${bound} ${String(limit)} ${unit === 'dB' && reading.figure.state === 'value' ? reading.figure.unit.word : unit}: ${met ? 'met' : 'NOT MET'}, margin ${margin.toFixed(2)} ${unit}`,
    );
  }
  if (reading.kind !== undefined)
    lines.push(
      `  kind: ${reading.side === undefined ? '' : `${reading.side.side} `}${reading.kind.kind} (${reading.kind.origin === 'declared' ? 'declared' : `assumed from the ${reading.kind.origin}`})`,
    );
  for (const remark of remarks) lines.push(`  ${remark}`);
  return `${lines.join('\n')}\n`;
}
