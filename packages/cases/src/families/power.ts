import {
  thdF,
  type AnalysisSettings,
  type PowerFigures,
  type PowerPairResult,
  type SequenceOrder,
  type ThreePhaseResult,
} from '@overtally/dsp';
import { z } from 'zod';
import { analyse, nominalOf, recordOf } from '../analyse-case.js';
import { CannotServe, type Mapper, type Quantities } from '../quantities.js';
import type { CaseRecord } from '../read-record.js';

/** Orders that the symmetrical components are listed for when the case does not say. */
const listedOrders = 13;
const thdOrder = 40;

const pairSettings = z.object({
  voltage: z.string(),
  current: z.string(),
  rated_current_a: z.number().positive().optional(),
});

const names = z.tuple([z.string(), z.string(), z.string()]);
const threePhaseSettings = z.object({
  voltages: names,
  currents: names,
  wires: z.enum(['3w', '4w']),
  orders: z.number().int().positive().default(listedOrders),
});

/** Family 5: power of a voltage with its current, or of three phases (IEEE 1459). */
export const power: Mapper = async (folder, one) => {
  const record = await recordOf(folder, one);
  const common = { profile: 'general', nominalFrequencyHz: nominalOf(one) } as const;
  const set = threePhaseSettings.safeParse(one.analysis);
  if (set.success) return ofThreePhases(record, common, set.data);
  return ofPair(record, common, pairSettings.parse(one.analysis));
};

async function ofPair(
  record: CaseRecord,
  common: AnalysisSettings,
  { voltage, current, rated_current_a: ratedCurrentA }: z.infer<typeof pairSettings>,
): Promise<Quantities> {
  const pair = { voltage: indexOf(record, voltage), current: indexOf(record, current) };
  const settings = { ...common, pairs: [pair], threePhase: [], ratedCurrentA };
  const [result] = (await analyse(record, settings)).power;
  if (result === undefined) throw new CannotServe('the channels have no common fundamental');
  return { f0_hz: result.frequencyHz, ...pairFigures(result), ...loadFigures(result) };
}

/** The quantities that IEEE 1459 gives a symbol keep it; the ratios have names. */
function pairFigures(figures: PowerFigures): Quantities {
  const { V, I, V1, I1, VH, IH, P, P1, PH, Q1, S, S1, N, DI, DV, SH, DH, SN, PF, PF1 } = figures;
  return {
    ...{ V, I, V1, I1, VH, IH, P, P1, PH, Q1, S, S1, N, DI, DV, SH, DH, SN, PF, PF1 },
    harmonic_pollution: figures.harmonicPollution,
    thd_v_1459: figures.thdV,
    thd_i_1459: figures.thdI,
  };
}

function loadFigures({ orders, transformer }: PowerPairResult): Quantities {
  return {
    fhl: transformer.fhl,
    fhl_str: transformer.fhlStr,
    k_factor_measured: transformer.kFactorMeasured,
    k_factor_rated: transformer.kFactorRated,
    factor_k_en: transformer.factorKEn,
    u_thd_f_40: thdF(
      orders.map(({ voltageRms }) => voltageRms),
      thdOrder,
    ),
    i_thd_f_40: thdF(
      orders.map(({ currentRms }) => currentRms),
      thdOrder,
    ),
    i_phase_zc_deg: orders.map(({ currentPhaseZeroCrossingDeg }) => currentPhaseZeroCrossingDeg),
  };
}

async function ofThreePhases(
  record: CaseRecord,
  common: AnalysisSettings,
  { voltages, currents, wires, orders }: z.infer<typeof threePhaseSettings>,
): Promise<Quantities> {
  const set = {
    voltages: indicesOf(record, voltages),
    currents: indicesOf(record, currents),
    wires,
  };
  const [result] = (await analyse(record, { ...common, pairs: [], threePhase: [set] })).threePhase;
  if (result === undefined) throw new CannotServe('the channels have no common fundamental');
  const phases = result.phases.flatMap((figures, i) =>
    Object.entries(pairFigures(figures)).map(([name, value]) => [`${name}_${i + 1}`, value]),
  );
  return {
    f0_hz: result.frequencyHz,
    ...effectiveFigures(result),
    ...(Object.fromEntries(phases) as Quantities),
    ...sequences('u', result.voltageSequences.slice(0, orders)),
    ...sequences('i', result.currentSequences.slice(0, orders)),
    u2_unbalance: result.voltageUnbalance.u2,
    u0_unbalance: result.voltageUnbalance.u0,
  };
}

function effectiveFigures(result: ThreePhaseResult): Quantities {
  const { P, Ve, Ie, Se, Se1, SeN, SU1, PFe } = result;
  return {
    ...{ P, Ve, Ie, Se, Se1, SeN, SU1, PFe },
    P1_plus: result.P1plus,
    Q1_plus: result.Q1plus,
    S1_plus: result.S1plus,
    S_arithmetic: result.Sarithmetic,
    V_ll: result.lineToLineRms,
    I_n: result.neutralRms,
  };
}

function sequences(letter: 'u' | 'i', orders: SequenceOrder[]): Quantities {
  const kinds = ['zero', 'positive', 'negative'] as const;
  const entries = kinds.flatMap((kind) => [
    [`${letter}_${kind}_rms`, orders.map((order) => order[kind].rms)],
    [`${letter}_${kind}_phase_deg`, orders.map((order) => order[kind].phaseDeg)],
  ]);
  return Object.fromEntries(entries) as Quantities;
}

function indicesOf(record: CaseRecord, [a, b, c]: [string, string, string]): [number, number, number] {
  return [indexOf(record, a), indexOf(record, b), indexOf(record, c)];
}

/** Index of a channel by the name that the case gives it. */
function indexOf({ channels, names: described }: CaseRecord, name: string): number {
  const index = channels[described.indexOf(name)]?.index;
  if (index === undefined) throw new CannotServe(`there is no channel "${name}"`);
  return index;
}
