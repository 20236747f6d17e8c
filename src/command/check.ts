/** `check`: findings and requirements, one a line, for a repository's checks. */
import type { Answer, ExitCode, World } from './answer';
import { exitCodeOf, repairText } from './evaluate';
import { nameOfLine, openFile, type Opened } from './open';

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
    const bound =
      line.requirement.atLeast === undefined
        ? `at most ${line.requirement.atMost}`
        : `at least ${line.requirement.atLeast}`;
    for (const { id } of cases) {
      const { requirement } = evaluation.reading(line.id, id);
      const standing =
        requirement === undefined
          ? 'not known, the value is withheld'
          : `${requirement.met ? 'met' : 'NOT MET'}, margin ${requirement.margin.toFixed(2)} ${requirement.unit}`;
      lines.push(`${file}: ${id}: ${nameOfLine(evaluation, line)}: requirement ${bound}: ${standing}`);
    }
  }
  return {
    lines: lines.map((line) => line.replace(/\s*\n\s*/g, ' ')),
    exitCode: exitCodeOf({ evaluation, cases, lines: evaluation.lines(), findings }),
  };
}
