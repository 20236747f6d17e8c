/** `functions`: the catalogue, the same text as in the page's reference. */
import { findFunction, FUNCTION_GROUPS, FUNCTIONS, nearestName, signatureOf, type FunctionEntry } from '../formula';
import { Refusal, type Answer } from './answer';

/** One function in full, or all by group. Throws Refusal for an unknown name. */
export function describeFunctions(name: string | undefined): Answer {
  if (name === undefined) return { results: listing(), messages: '', exitCode: 0 };
  const entry = findFunction(name);
  if (entry === undefined) {
    const nearest = nearestName(
      name,
      FUNCTIONS.map((other) => other.name),
    );
    throw new Refusal(`There is no function “${name}”.${nearest === undefined ? '' : ` Is it “${nearest}”?`}`);
  }
  return { results: describe(entry), messages: '', exitCode: 0 };
}

function listing(): string {
  const width = Math.max(...FUNCTIONS.map((entry) => signatureOf(entry).length));
  return FUNCTION_GROUPS.map((group) => {
    const entries = FUNCTIONS.filter((entry) => entry.group === group);
    return `${group}\n${entries.map((entry) => `  ${signatureOf(entry).padEnd(width)}  ${entry.text}\n`).join('')}`;
  }).join('\n');
}

function describe(entry: FunctionEntry): string {
  const parameters = entry.parameters.map(({ name, text, unit, default: standard }) => {
    const inUnit = unit === '' || unit === '1' ? '' : `, in ${unit}`;
    return `    ${name}: ${text}${inUnit}${standard === undefined ? '' : `; ${standard} when left out`}\n`;
  });
  const validity =
    entry.form === 'ordinary' && entry.validity !== undefined ? `  holds for ${entry.validity.range}\n` : '';
  return (
    `${signatureOf(entry)}\n  ${entry.text}\n` +
    `  parameters\n${parameters.join('')}` +
    `  result: ${entry.result}\n  formula: ${entry.formula}\n${validity}  source: ${entry.source}\n  example: ${entry.example}\n`
  );
}
