/** `check`: findings and requirements, one a line, for a repository's checks. */
import type { Answer, ExitCode, World } from './answer';
import { exitCodeOf, repairText } from './evaluate';
import { nameOfLine, openFile, type Opened } from './open';
import { oneLine } from './plain-text';
import { boundText, standingText } from './requirement-text';

/** Checks files; the exit code is the worst. */
export function checkFiles(files: readonly string[], world: World): Answer {
  const opened = files.map((file) => openFile(file, world));
  const reports = opened.map((one) => report(one));
  return {
    results: reports.map(({ lines }) => lines.map((line) => `${line}\n`).join('')).join(''),
    messages: opened.map(({ messages }) => messages).join(''),
    exitCode: reports.some(({ exitCode }) => exitCode === 1) ? 1 : 0,
  };
}

function report({ file, evaluation }: Opened): { lines: string[]; exitCode: ExitCode } {
  const { cases } = evaluation.worksheet;
  const findings = evaluation.sheetFindings();
  const lines: string[] = findings.map((finding) => {
    const line = evaluation.line(finding.lineId);
    const name = line === undefined ? finding.lineId : nameOfLine(evaluation, line);
    const repair = repairText(finding);
    const answer = finding.accepted === undefined ? '' : ` [accepted: ${finding.accepted}]`;
    return `${file}: ${finding.caseIds.join(',')}: ${name}: ${finding.severity} ${finding.code}: ${finding.message}${repair === null ? '' : ` [repair: ${repair}]`}${answer}`;
  });
  for (const line of evaluation.lines()) {
    if (line.requirement === undefined) continue;
    const head = `${nameOfLine(evaluation, line)}: requirement ${boundText(line.requirement)}`;
    for (const { id } of cases) lines.push(`${file}: ${id}: ${head}: ${standingText(evaluation.reading(line.id, id))}`);
  }
  return {
    lines: lines.map(oneLine),
    exitCode: exitCodeOf({ evaluation, cases, lines: evaluation.lines(), findings }),
  };
}
