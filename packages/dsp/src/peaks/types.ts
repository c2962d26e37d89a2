/** One line that stands out of the spectrum of a stretch. */
export interface SpectralLine {
  /** Interpolated between the lines of the transform. */
  frequencyHz: number;
  /** rms value, corrected for the window and for the place between two lines. */
  rms: number;
  /** Which entry of the list of families it belongs to; null for a line of its own. */
  familyIndex: number | null;
  /** Its order in that family, from 1; null for a line of its own. */
  order: number | null;
}

/** Lines whose frequencies are whole multiples of one fundamental, more of them than chance would bring. */
export interface HarmonicFamily {
  fundamentalHz: number;
  /** Orders with a line of their own, ascending; order 1 need not be among them. */
  orders: number[];
  /** Power of its lines as a share (0 to 1) of the power of all listed lines. */
  shareOfPower: number;
}
