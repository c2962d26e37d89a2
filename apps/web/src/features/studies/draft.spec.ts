import { studyDefinitionSchema } from '@overtally/contracts';
import { circuitKinds } from '@overtally/dsp';
import { describe, expect, it } from 'vitest';
import { definitionOf, draftOf, emptyDefinition, physicalBehind, withInput, withStages } from './draft.js';
import { chainFacts } from './predict.js';
import { newStage, stageGroups, stageWords, type StageKind } from './stages/stage-words.js';
import { withKey } from './draft.js';

const series = { frequencyHz: 50, dc: 0, components: [{ order: 1, rms: 1, phaseDeg: 0 }] };
const definition = {
  ...emptyDefinition({ kind: 'harmonics', series }, { quantity: 'current', unit: 'A' }),
  stages: [newStage('notch'), newStage('closed-loop'), newStage('zeros-poles-gain')],
};
const kinds = Object.keys(stageWords) as StageKind[];

describe('definition and draft', () => {
  it('are the same study there and back, as the contract has it', () => {
    const back = definitionOf(draftOf(definition, series));
    expect(back).toEqual(definition);
    expect(studyDefinitionSchema.parse(back)).toEqual(definition);
  });

  it('follow the quantity through an impedance and back through an admittance', () => {
    const current = { quantity: 'current', unit: 'A' } as const;
    expect(physicalBehind(current, [newStage('series-impedance')])).toEqual({
      quantity: 'voltage',
      unit: 'V',
    });
    const both = [newStage('series-impedance'), newStage('series-admittance')];
    expect(physicalBehind(current, both)).toEqual(current);
    const off = { ...newStage('series-impedance'), isOn: false };
    expect(physicalBehind(current, [off])).toEqual(current);
  });

  it('keep what was said of the output while stages do not change the quantity', () => {
    const draft = { ...draftOf({ ...definition, stages: [] }, series), outputUnit: 'mA' };
    expect(withStages(draft, [withKey(newStage('gain'))]).outputUnit).toBe('mA');
    expect(withStages(draft, [withKey(newStage('series-impedance'))]).outputUnit).toBe('V');
    const other = withInput(draft, {
      ...{ input: draft.input, series },
      physical: { quantity: 'voltage', unit: 'V' },
    });
    expect(other).toMatchObject({ inputUnit: 'V', outputUnit: 'V', outputQuantity: 'voltage' });
  });
});

describe('kinds of stages', () => {
  it('are all offered, each once', () => {
    const offered = stageGroups.flatMap((group) => group.kinds);
    expect([...offered].sort()).toEqual([...kinds].sort());
    expect(Object.keys(circuitKinds).every((kind) => offered.includes(kind as StageKind))).toBe(true);
  });

  it.each(kinds.filter((kind) => kind !== 'integrator'))(
    '%s begins with values that make a stable stage',
    (kind) => {
      const { stability } = chainFacts([withKey(newStage(kind))]);
      expect(['stable', 'marginal']).toContain(stability.verdict);
      expect(stability.verdict).toBe('stable');
    },
  );
});
