/** Notes on decibel sums: things that are right in some budgets and slips in others. They never withhold a value. */
import { findUnit, isDimensionless, writeQuantity, type Meaning, type Unit } from '../quantity';
import { present } from '../base';
import { asFactor, type Context } from './context';
import type { LineOfSum } from './judge';
import { isLevel } from './net';
import { withReplacedTerms, withTurnedTerm, withoutTerm, type Grouped } from './repairs';
import type { Checked, SumTerm } from './types';

const near = (a: number, b: number): boolean => Math.abs(a - b) < 1e-9;
const isPositive = (value: number): boolean => value > 0;

const isNoiseFigure = ({ kind, type }: SumTerm): boolean =>
  kind === 'noise figure' ||
  (type.meaning !== undefined && near(type.meaning.f, 1) && near(type.meaning.l + type.meaning.u + type.meaning.w, 0));

/** Makes the notes that a sum deserves. */
export function sayNotes(
  checked: Checked,
  terms: readonly SumTerm[],
  net: Meaning,
  context: Context,
  line: LineOfSum | undefined,
): void {
  const say = (grouped: Grouped): { kind: 'entry'; title: string; entry: string } => ({
    kind: 'entry',
    title: grouped.title,
    entry: context.replace(checked.tree, grouped.text),
  });
  sayNumbers(terms, context, line?.hidden);
  sayLossAdded(checked, terms, net, context, line, say);
  sayFigures(checked, terms, net, context, say);
  sayReferenceTemperature(checked, terms, context, say);
}

type Say = (grouped: Grouped) => { kind: 'entry'; title: string; entry: string };

const decibel = (): Unit => present(findUnit('dB'), 'dB');

function sayNumbers(terms: readonly SumTerm[], context: Context, hidden: SumTerm | undefined): void {
  for (const term of terms) {
    if (!term.isNumber || term === hidden) continue;
    const written = term.tree.type === 'literal' ? `${term.text} dB` : `${asFactor(term.tree, term.text)} * 1 dB`;
    context.say('number-as-decibels', term.tree, {
      facts: { number: term.text },
      lateFacts: (evaluate) => ({ decibels: writeQuantity(evaluate(term.plan), decibel()) }),
      repairs: [context.rewrite(term.tree, written)],
    });
  }
}

const REQUIREMENT = /(^|_)(req|min|sens|threshold|thr|needed)(_|$|\d)|requir|sensitiv|minimum|threshold|needed|needs/i;

/** True when the sum takes a requirement back through the chain: losses come on top there, gains come off. */
function refersBack(terms: readonly SumTerm[], line: LineOfSum | undefined): boolean {
  if (line !== undefined && (REQUIREMENT.test(line.symbol) || REQUIREMENT.test(line.label))) return true;
  const levels = terms.filter((term) => term.coefficient > 0 && isLevel(term));
  if (levels.some(({ symbol }) => symbol !== undefined && REQUIREMENT.test(symbol))) return true;
  const hasRatio = terms.some(
    ({ coefficient, type: { meaning } }) =>
      coefficient > 0 && meaning !== undefined && near(meaning.w, 1) && near(meaning.u, -1),
  );
  if (hasRatio && levels.length > 0) return true;
  const gains = terms.filter(({ kind, type }) => kind === 'gain' && isDimensionless(type.dimension));
  const losses = terms.filter(({ kind }) => kind === 'loss');
  return (
    gains.length > 0 &&
    gains.every(({ coefficient }) => coefficient < 0) &&
    losses.every(({ coefficient }) => coefficient > 0)
  );
}

function sayLossAdded(
  checked: Checked,
  terms: readonly SumTerm[],
  net: Meaning,
  context: Context,
  line: LineOfSum | undefined,
  say: Say,
): void {
  const isLevelSum = near(net.w + net.u + net.l, 1);
  const isGain =
    near(net.w, 0) &&
    near(net.u, 0) &&
    near(net.l, 0) &&
    checked.type.form === 'decibel' &&
    isDimensionless(checked.type.dimension) &&
    terms.some(({ kind, coefficient }) => kind === 'gain' && coefficient > 0);
  if (!(isLevelSum || isGain) || line?.kind === 'loss' || refersBack(terms, line)) return;
  for (const term of terms) {
    if (term.kind !== 'loss' || term.coefficient <= 0) continue;
    context.say('loss-added', term.tree, {
      facts: { loss: term.text },
      lateFacts: (evaluate) => ({ size: writeQuantity(evaluate(term.plan), decibel()) }),
      repairs: [say(withTurnedTerm(terms, term))],
      applies: { plan: term.plan, test: isPositive },
    });
  }
}

function sayFigures(checked: Checked, terms: readonly SumTerm[], net: Meaning, context: Context, say: Say): void {
  const figure = terms.find((term) => term.coefficient > 0 && isNoiseFigure(term));
  if (figure === undefined || !near(net.f, 1)) return;
  const loss = terms.find(({ kind, coefficient }) => kind === 'loss' && near(coefficient, 1));
  if (loss !== undefined && near(net.w, 0) && near(net.u, 0) && near(net.l, 0))
    context.say('nf-plus-loss', checked.tree, {
      facts: { figure: figure.text, loss: loss.text },
      repairs: [
        say(
          withReplacedTerms(
            terms,
            [figure, loss],
            `cascade_nf(passive_nf(${loss.text}, T_0), -${asFactor(loss.tree, loss.text)}, ${figure.text})`,
          ),
        ),
      ],
    });
  const wanted = terms.find(
    (term) => term.coefficient > 0 && isLevel(term) && term.isDeclared && term.side === 'wanted',
  );
  const hasNoise = terms.some((term) => term.coefficient > 0 && isLevel(term) && term !== wanted);
  if (wanted !== undefined && !hasNoise)
    context.say('figure-on-wanted', figure.tree, {
      facts: { figure: figure.text, level: wanted.text },
      repairs: [say(withoutTerm(terms, figure))],
    });
}

const isNotReference = (kelvin: number): boolean => Math.abs(kelvin - 290) > 0.5;

function sayReferenceTemperature(checked: Checked, terms: readonly SumTerm[], context: Context, say: Say): void {
  const figure = terms.find((term) => near(term.coefficient, 1) && isNoiseFigure(term));
  const noise = terms.find(({ coefficient, type }) => near(coefficient, 1) && type.noiseTemperature !== undefined);
  const source = noise?.type.noiseTemperature;
  if (figure === undefined || noise === undefined || source === undefined) return;
  const call = noise.tree;
  const isThermal = call.type === 'call' && (call.name === 'thermal_noise' || call.name === 'noise_density');
  const [first, ...rest] = isThermal ? call.parameters.map((parameter) => context.textOf(parameter)) : [];
  const written = `${call.type === 'call' ? call.name : ''}(${[`${first ?? ''} + noise_temperature(${figure.text})`, ...rest].join(', ')})`;
  context.say('reference-temperature', checked.tree, {
    facts: { figure: figure.text },
    lateFacts: (evaluate) => ({ temperature: writeQuantity(evaluate(source.plan), present(findUnit('K'), 'K')) }),
    repairs: first === undefined ? [] : [say(withReplacedTerms(terms, [noise, figure], written))],
    applies: { plan: source.plan, test: isNotReference },
  });
}
