import type { ReportStage, ReportStudy, StudyDefinition, StudyStage } from '@overtally/contracts';
import { circuitKinds, frequencyResponse, isCircuitName, logFrequencies } from '@overtally/dsp';
import { chainOfStudy } from './computing/stage-chain.js';
import type { StudyVersionRow } from './studies.repository.js';
import { studyNumber } from './study-view.js';

const responsePoints = 120;

/** A version of a study as a report says it, in words and with its numbers. */
export function reportStudy(
  row: StudyVersionRow,
  limitSet: ReportStudy['limitSet'],
  source: ReportStudy['source'],
): ReportStudy {
  const { definition, result } = row;
  const { inputQuantity, inputUnit, outputQuantity, outputUnit, thdMaxOrder, assumptions } = definition;
  return {
    ...{ id: row.studyId, versionId: row.id, number: studyNumber(row.number), name: row.name },
    ...{ version: row.version, author: { id: row.authorId, name: row.authorName } },
    savedAt: row.createdAt.toISOString(),
    ...{ source, inputQuantity, inputUnit, outputQuantity, outputUnit, thdMaxOrder, limitSet },
    stages: definition.stages.map(stageInWords),
    spreadWords: spreadInWords(definition),
    ...{ assumptions, result },
    response: result.output === null ? [] : responseOfStudy(row),
  };
}

/** Gain from a fifth of the fundamental to twice the highest order. */
function responseOfStudy({ definition, series }: StudyVersionRow): ReportStudy['response'] {
  const highest = series.components.reduce((most, { order }) => Math.max(most, order), 1);
  const { frequencyHz } = series;
  const decades = Math.log10(10 * highest);
  const at = logFrequencies(frequencyHz / 5, 2 * highest * frequencyHz, responsePoints / decades);
  return frequencyResponse(chainOfStudy(definition), at).map(({ frequencyHz: hertz, magnitudeDb }) => ({
    frequencyHz: hertz,
    gainDb: magnitudeDb,
  }));
}

function spreadInWords({ spread, stages }: StudyDefinition): string | null {
  if (spread === null) return null;
  const count = stages.filter(({ isOn }) => isOn).flatMap(({ tolerances }) => tolerances).length;
  const values = `${count} value${count === 1 ? '' : 's'} with a tolerance`;
  if (spread.method === 'corners') return `All corners of ${values}`;
  return `${spread.draws} random draws of ${values}, independent of one another, seed ${spread.seed}`;
}

function stageInWords({ name, isOn, spec, tolerances }: StudyStage): ReportStage {
  const kind = kindInWords(spec);
  const head = { name: name || kind, kind, isOn };
  if (spec.kind !== 'circuit' || !isCircuitName(spec.circuit)) {
    return { ...head, meaning: 'output over input', values: [], words: specInWords(spec) };
  }
  const { parameters, meaning } = circuitKinds[spec.circuit];
  const values = parameters.flatMap(({ name: key, symbol, unit, meaning: ofValue, default: fallback }) => {
    const value = spec.values[key] ?? fallback;
    if (value === undefined || value === null) return [];
    const tolerance = tolerances.find(({ parameter }) => parameter === key);
    const tolerancePercent = tolerance?.tolerancePercent ?? null;
    return [{ symbol, meaning: ofValue, value, unit, tolerancePercent }];
  });
  return { ...head, meaning, values, words: '' };
}

function kindInWords(spec: StudyStage['spec']): string {
  if (spec.kind !== 'circuit') return spec.kind.replaceAll('-', ' ');
  return spec.circuit
    .replaceAll('-', ' ')
    .replace(/\b(?:rc|rl|lc)\b/g, (letters) => letters.toUpperCase())
    .replace('c type', 'C-type');
}

const complex = ({ re, im }: { re: number; im: number }): string =>
  im === 0 ? String(re) : `${re} ${im < 0 ? '−' : '+'} j${Math.abs(im)}`;

const listed = (values: readonly string[]): string => (values.length === 0 ? 'none' : values.join('; '));

function specInWords(spec: StudyStage['spec']): string {
  switch (spec.kind) {
    case 'coefficients':
      return `Numerator ${spec.numerator.join(', ')}; denominator ${spec.denominator.join(', ')} (descending powers of s)${delayInWords(spec.delayS)}`;
    case 'zeros-poles-gain':
      return `Zeros in 1/s: ${listed(spec.zeros.map(complex))}. Poles in 1/s: ${listed(spec.poles.map(complex))}. Gain ${spec.gain}${delayInWords(spec.delayS)}`;
    case 'circuit':
      return Object.entries(spec.values)
        .map(([name, value]) => `${name} ${value}`)
        .join(', ');
    case 'closed-loop': {
      const { gain, integralTimeS, derivativeTimeS, derivativeFilter } = spec.controller;
      const controller = [
        `Kp ${gain}`,
        integralTimeS !== undefined && `Ti ${integralTimeS} s`,
        derivativeTimeS !== undefined && `Td ${derivativeTimeS} s`,
        derivativeFilter !== undefined && `N ${derivativeFilter}`,
      ].filter((part) => part !== false);
      const plant = spec.plant.map((stage) => `${kindInWords(stage)} (${specInWords(stage)})`);
      return `Controller ${controller.join(', ')}; plant ${plant.join(', then ')}; ${spec.output.replaceAll('-', ' ')}`;
    }
  }
}

const delayInWords = (delayS: number | undefined): string => (delayS ? `; delay ${delayS} s` : '');
