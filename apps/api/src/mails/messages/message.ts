/** What a message says, in parts, from which its text and its HTML are made alike. All words are plain text. */
export interface Message {
  heading: string;
  /** What it is about, as the title block of a sheet has it: caption and value. */
  facts: readonly (readonly [caption: string, value: string])[];
  paragraphs: readonly string[];
  /** Words of a person that are passed on. */
  quote?: string;
  /** What the reader can do, one after the other as a list. */
  items?: readonly string[];
  action?: { label: string; href: string };
  /** Why the reader gets this message. */
  reason: string;
}
