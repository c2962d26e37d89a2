import { describe, expect, it } from 'vitest';
import {
  analyseRecord,
  thdF,
  type PowerFigures,
  type PowerPairResult,
  type ProfileName,
  type RecordPower,
  type SequenceOrder,
  type ThreePhaseResult,
} from '../src/index.js';
import { judge } from './judge.js';
import { readChannels, referenceCases, type ReferenceCase } from './reference-cases.js';

const PROFILES = ['mains', 'general'] as const;
const cases = PROFILES.flatMap((profile) => referenceCases(5).map((reference) => ({ profile, reference })));

describe.each(cases)('$reference.id $reference.title ($profile)', ({ profile, reference }) => {
  const results = measure(reference, profile);

  it.each(Object.keys(reference.expected))('%s', (quantity) => {
    expect(judge(reference.expected[quantity]!, results[quantity])).toBeNull();
  });
});

interface Channels {
  voltages: string[];
  currents: string[];
}

function channelsOf(analysis: ReferenceCase['analysis']): Channels {
  return analysis.voltages === undefined
    ? { voltages: [analysis.voltage as string], currents: [analysis.current as string] }
    : { voltages: analysis.voltages as string[], currents: analysis.currents as string[] };
}

/** Powers as the analysis gives them, pairs and sets as the case states them. */
function measure(reference: ReferenceCase, profile: ProfileName): Record<string, unknown> {
  const { analysis } = reference;
  const { sampleRateHz, samples } = readChannels(reference);
  const { voltages, currents } = channelsOf(analysis);
  const isThreePhase = voltages.length === 3;
  const result = analyseRecord({
    sampleRateHz,
    channels: [...voltages, ...currents].map((name, index) => ({
      ...{ index, name, samples: samples[name]! },
      ...(index < voltages.length ? { quantity: 'voltage', unit: 'V' } : { quantity: 'current', unit: 'A' }),
    })),
    settings: {
      profile,
      nominalFrequencyHz: analysis.nominal_hz as number,
      maxOrder: analysis.orders as number,
      pairs: voltages.map((_, k) => ({ voltage: k, current: voltages.length + k })),
      threePhase: isThreePhase
        ? [{ voltages: [0, 1, 2], currents: [3, 4, 5], wires: analysis.wires as '3w' | '4w' }]
        : [],
      ratedCurrentA: analysis.rated_current_a as number | undefined,
    },
  });
  return isThreePhase ? threePhase(result) : singlePhase(result.power[0]!);
}

function singlePhase(pair: PowerPairResult): Record<string, unknown> {
  const rms = (of: 'voltageRms' | 'currentRms') => pair.orders.map((order) => order[of]);
  return {
    ...pair,
    f0_hz: pair.frequencyHz,
    harmonic_pollution: pair.harmonicPollution,
    thd_v_1459: pair.thdV,
    thd_i_1459: pair.thdI,
    u_thd_f_40: thdF(rms('voltageRms'), 40),
    i_thd_f_40: thdF(rms('currentRms'), 40),
    i_phase_zc_deg: pair.orders.map((order) => order.currentPhaseZeroCrossingDeg),
    fhl: pair.transformer.fhl,
    fhl_str: pair.transformer.fhlStr,
    k_factor_measured: pair.transformer.kFactorMeasured,
    k_factor_rated: pair.transformer.kFactorRated,
    factor_k_en: pair.transformer.factorKEn,
  };
}

function threePhase({ power, threePhase: [set] }: RecordPower): Record<string, unknown> {
  const three = set!;
  return {
    ...three,
    f0_hz: three.frequencyHz,
    P1_plus: three.P1plus,
    Q1_plus: three.Q1plus,
    S1_plus: three.S1plus,
    S_arithmetic: three.Sarithmetic,
    V_ll: three.lineToLineRms,
    I_n: three.neutralRms,
    ...Object.assign({}, ...power.map((pair, k) => ofPhase(pair, k + 1))),
    ...sequences('u', three.voltageSequences),
    ...sequences('i', three.currentSequences),
    u2_unbalance: three.voltageUnbalance.u2,
    u0_unbalance: three.voltageUnbalance.u0,
  };
}

function ofPhase(figures: PowerFigures, phase: number): Record<string, unknown> {
  const names = ['V', 'I', 'P', 'S', 'Q1', 'PF', 'PF1'] as const;
  return Object.fromEntries(names.map((name) => [`${name}_${phase}`, figures[name]]));
}

function sequences(letter: string, orders: ThreePhaseResult['voltageSequences']): Record<string, unknown> {
  const kinds: Exclude<keyof SequenceOrder, 'order'>[] = ['zero', 'positive', 'negative'];
  return Object.fromEntries(
    kinds.flatMap((kind) => [
      [`${letter}_${kind}_rms`, orders.map((order) => order[kind].rms)],
      [`${letter}_${kind}_phase_deg`, orders.map((order) => order[kind].phaseDeg)],
    ]),
  );
}
