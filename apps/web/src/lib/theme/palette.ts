/** Colours by theme, as plain values: charts cannot resolve CSS variables. */
export interface Palette {
  paper: string;
  sheet: string;
  rule: string;
  ruleStrong: string;
  /** Boundary of form controls: 3:1 against paper and sheet (WCAG 2.2, 1.4.11). */
  edge: string;
  ink: string;
  inkSoft: string;
  act: string;
  /** Text on `act`. */
  onAct: string;
  wash: string;
  over: string;
  near: string;
  within: string;
}

export const light: Palette = {
  paper: '#F7F3EA',
  sheet: '#FFFDF8',
  rule: '#DED6C5',
  ruleStrong: '#B8AD97',
  edge: '#8C816A',
  ink: '#1B2430',
  inkSoft: '#5A6471',
  act: '#1F4E8C',
  onAct: '#FFFDF8',
  wash: '#E8EEF7',
  over: '#BC3717',
  near: '#8F5B00',
  within: '#45705C',
};

export const dark: Palette = {
  paper: '#14171B',
  sheet: '#1A1E23',
  rule: '#31383F',
  ruleStrong: '#566069',
  edge: '#6B757E',
  ink: '#ECE6DA',
  inkSoft: '#A2A8AF',
  act: '#8FB6EC',
  onAct: '#14171B',
  wash: '#22303F',
  over: '#FF7F5C',
  near: '#D9A441',
  within: '#8DB89F',
};
