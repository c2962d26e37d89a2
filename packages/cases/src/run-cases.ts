import { AnalysisInputError } from '@overtally/dsp';
import { readCases, type ReferenceCase } from './case-file.js';
import { distortionOfWaves } from './families/distortion-of-waves.js';
import { filesFromInstruments } from './families/files-from-instruments.js';
import { groupsAndSmoothing } from './families/groups-and-smoothing.js';
import { harmonicSeries } from './families/harmonic-series.js';
import { power } from './families/power.js';
import { qualityFlags } from './families/quality-flags.js';
import { sines } from './families/sines.js';
import { singleTones } from './families/single-tones.js';
import { transferFunctions } from './families/transfer-functions.js';
import { windowsAndSpectra } from './families/windows-and-spectra.js';
import { CannotServe, type Mapper, type Quantities } from './quantities.js';

/** What computes the quantities of each family of cases. */
const mappers: Partial<Record<number, Mapper>> = {
  1: sines,
  2: harmonicSeries,
  3: distortionOfWaves,
  4: groupsAndSmoothing,
  5: power,
  6: singleTones,
  7: windowsAndSpectra,
  8: transferFunctions,
  9: filesFromInstruments,
  10: qualityFlags,
};

export interface CaseResults {
  results: Record<string, Quantities>;
  /** Cases without a result, and why. */
  leftOut: { id: string; reason: string }[];
  /** Cases that ended with an error of the program or its surroundings. */
  failed: { id: string; error: unknown }[];
}

/** Computes the quantities of every case in a folder; whatever happens to one of them, the others are computed. */
export async function runCases(folder: string): Promise<CaseResults> {
  const outcome: CaseResults = { results: {}, leftOut: [], failed: [] };
  for (const one of await readCases(folder)) {
    try {
      outcome.results[one.id] = await quantitiesOf(folder, one);
    } catch (error) {
      if (error instanceof CannotServe || error instanceof AnalysisInputError) {
        outcome.leftOut.push({ id: one.id, reason: error.message });
      } else outcome.failed.push({ id: one.id, error });
    }
  }
  return outcome;
}

async function quantitiesOf(folder: string, one: ReferenceCase): Promise<Quantities> {
  const mapper = mappers[one.family];
  if (mapper === undefined) throw new CannotServe(`nothing computes family ${one.family}`);
  return mapper(folder, one);
}
