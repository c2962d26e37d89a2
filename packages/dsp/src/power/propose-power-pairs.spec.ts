import { describe, expect, it } from 'vitest';
import { proposePowerPairs, type DescribedChannel } from './propose-power-pairs.js';

// Names as instruments, test benches and fault recorders give them (common practice; the plant record follows the
// channel list of a COMTRADE file).

function channels(voltages: string[], currents: string[], units = ['V', 'A']): DescribedChannel[] {
  return [
    ...voltages.map((name) => ({ name, quantity: 'voltage', unit: units[0]! })),
    ...currents.map((name) => ({ name, quantity: 'current', unit: units[1]! })),
  ].map((channel, index) => ({ index, ...channel }));
}

/** Pairs as "voltage/current/phase" and sets as "voltages|currents|wires", by name. */
function proposed(list: DescribedChannel[]) {
  const name = (index: number) => list.find((channel) => channel.index === index)!.name;
  const { pairs, threePhase } = proposePowerPairs(list);
  return {
    pairs: pairs.map((p) => `${name(p.voltage)}/${name(p.current)}/${p.phase ?? '-'}`),
    sets: threePhase.map(
      (s) => `${s.voltages.map(name).join(' ')}|${s.currents.map(name).join(' ')}|${s.wires}`,
    ),
  };
}

describe('proposePowerPairs', () => {
  it('pairs the only voltage with the only current', () => {
    expect(proposed(channels(['u_V'], ['i_A'])).pairs).toEqual(['u_V/i_A/-']);
    expect(proposed(channels(['Mains'], ['Load'])).pairs).toEqual(['Mains/Load/-']);
    expect(proposed(channels(['CH1'], ['CH2'])).pairs).toEqual(['CH1/CH2/-']);
  });

  it.each([
    [
      ['u1_V', 'u2_V', 'u3_V'],
      ['i1_A', 'i2_A', 'i3_A'],
    ],
    [
      ['U1', 'U2', 'U3'],
      ['I1', 'I2', 'I3'],
    ],
    [
      ['UL1', 'UL2', 'UL3'],
      ['IL1', 'IL2', 'IL3'],
    ],
    [
      ['UL1', 'UL2', 'UL3'],
      ['I1', 'I2', 'I3'],
    ],
    [
      ['VA', 'VB', 'VC'],
      ['IA', 'IB', 'IC'],
    ],
    [
      ['V_A', 'V_B', 'V_C'],
      ['I_A', 'I_B', 'I_C'],
    ],
    [
      ['V_R', 'V_Y', 'V_B'],
      ['I_R', 'I_Y', 'I_B'],
    ],
    [
      ['UR', 'US', 'UT'],
      ['IR', 'IS', 'IT'],
    ],
    [
      ['UU', 'UV', 'UW'],
      ['IU', 'IV', 'IW'],
    ],
    [
      ['Voltage L1', 'Voltage L2', 'Voltage L3'],
      ['Current L1', 'Current L2', 'Current L3'],
    ],
    [
      ['Spannung L1', 'Spannung L2', 'Spannung L3'],
      ['Strom L1', 'Strom L2', 'Strom L3'],
    ],
    [
      ['Phase A voltage', 'Phase B voltage', 'Phase C voltage'],
      ['Phase A current', 'Phase B current', 'Phase C current'],
    ],
    [
      ['Input_VA', 'Input_VB', 'Input_VC'],
      ['Input_IA', 'Input_IB', 'Input_IC'],
    ],
    [
      ['VA1', 'VB1', 'VC1'],
      ['IA1', 'IB1', 'IC1'],
    ],
    [
      ['voltageA', 'voltageB', 'voltageC'],
      ['currentA', 'currentB', 'currentC'],
    ],
  ])('finds three phases in %j and %j', (voltages, currents) => {
    expect(proposed(channels(voltages, currents))).toEqual({
      pairs: voltages.map((voltage, k) => `${voltage}/${currents[k]}/${k + 1}`),
      sets: [`${voltages.join(' ')}|${currents.join(' ')}|4w`],
    });
  });

  it('orders the phases by name, not by place', () => {
    expect(proposed(channels(['UL3', 'UL1', 'UL2'], ['IL2', 'IL3', 'IL1'])).sets).toEqual([
      'UL1 UL2 UL3|IL1 IL2 IL3|4w',
    ]);
  });

  it('finds every circuit of a plant record and leaves single quantities alone', () => {
    const generators = ['G1', 'G2', 'G3', 'G4'];
    const phases = ['A', 'B', 'C'];
    const of = (letter: string, circuit: string) => phases.map((phase) => `${letter}${phase}_${circuit}`);
    const list = channels(
      [...generators.flatMap((g) => of('V', g)), ...of('V', 'B69')],
      [...generators.flatMap((g) => of('I', g)), 'IN_TF7', ...of('I', 'TF7')],
      ['kV', 'A'],
    );
    const { pairs, sets } = proposed(list);
    expect(sets).toEqual(generators.map((g) => `VA_${g} VB_${g} VC_${g}|IA_${g} IB_${g} IC_${g}|4w`));
    expect(pairs).toEqual(
      generators.flatMap((g) => phases.map((phase, k) => `V${phase}_${g}/I${phase}_${g}/${k + 1}`)),
    );
  });

  it('does not put the voltages of a busbar to the currents of a transformer', () => {
    const list = channels(['VA_B69', 'VB_B69', 'VC_B69'], ['IA_TF7', 'IB_TF7', 'IC_TF7', 'IN_TF7']);
    expect(proposed(list)).toEqual({ pairs: [], sets: [] });
  });

  it('pairs circuits of the same name', () => {
    expect(proposed(channels(['u_in', 'u_out'], ['i_out', 'i_in'])).pairs).toEqual([
      'u_in/i_in/-',
      'u_out/i_out/-',
    ]);
    expect(proposed(channels(['V1', 'V2'], ['I1', 'I2'])).pairs).toEqual(['V1/I1/-', 'V2/I2/-']);
  });

  it('takes numbers beyond 3 for circuits, not for phases', () => {
    const { pairs, sets } = proposed(channels(['u1', 'u2', 'u3', 'u4'], ['i1', 'i2', 'i3', 'i4']));
    expect(sets).toEqual([]);
    expect(pairs).toEqual(['u1/i1/-', 'u2/i2/-', 'u3/i3/-', 'u4/i4/-']);
  });

  it('knows no phases where a name fits two ways of naming them', () => {
    // B is phase 2 of A, B, C and phase 3 of R, Y, B.
    const { pairs, sets } = proposed(
      channels(['VA', 'VB', 'VC', 'VR', 'VY'], ['IA', 'IB', 'IC', 'IR', 'IY']),
    );
    expect(sets).toEqual([]);
    expect(pairs).toEqual(['VA/IA/-', 'VB/IB/-', 'VC/IC/-', 'VR/IR/-', 'VY/IY/-']);
  });

  it('pairs one current with its phase of three voltages', () => {
    expect(proposed(channels(['u1', 'u2', 'u3'], ['i2']))).toEqual({ pairs: ['u2/i2/2'], sets: [] });
  });

  it.each([
    ['two currents for one voltage', ['u'], ['i_a1', 'i_a2']],
    ['a voltage between lines', ['U12'], ['I1']],
    ['voltages between lines', ['U12', 'U23', 'U31'], ['I1', 'I2', 'I3']],
    ['voltages between lines by letter', ['VAB', 'VBC', 'VCA'], ['IA', 'IB', 'IC']],
    ['a voltage between unnamed lines', ['VLL'], ['I']],
    ['different phases', ['UL1'], ['IL2']],
    ['a neutral current', ['UL1'], ['IN']],
    ['twice the same name', ['u1', 'u1'], ['i1', 'x']],
    ['numbered inputs', ['CH1', 'CH2', 'CH3'], ['CH4', 'CH5', 'CH6']],
    ['no current', ['u1', 'u2'], []],
  ])('leaves out what is ambiguous: %s', (_, voltages, currents) => {
    expect(proposed(channels(voltages, currents))).toEqual({ pairs: [], sets: [] });
  });

  it('passes over units that are no volts and amperes, and other quantities', () => {
    expect(proposed(channels(['u'], ['i'], ['counts', 'A'])).pairs).toEqual([]);
    expect(proposed(channels(['u'], ['i'], ['mV', 'kA'])).pairs).toEqual(['u/i/-']);
    const other = { index: 0, name: 'a', quantity: 'acceleration', unit: 'g' };
    expect(proposePowerPairs([other])).toEqual({ pairs: [], threePhase: [] });
  });

  it('says what the set rests on', () => {
    const reason = (voltages: string[], currents: string[]) =>
      proposePowerPairs(channels(voltages, currents)).threePhase[0]!.reason;
    expect(reason(['u1', 'u2', 'u3'], ['i1', 'i2', 'i3'])).toContain('taken as measured to neutral');
    expect(reason(['UAN', 'UBN', 'UCN'], ['IA', 'IB', 'IC'])).toContain('speak of a neutral');
    expect(reason(['VA', 'VB', 'VC'], ['IA', 'IB', 'IC', 'IN'])).toContain('speak of a neutral');
  });
});
