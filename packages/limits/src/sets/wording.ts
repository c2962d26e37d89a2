/** Stands among the notes of every published set. */
export const checkEdition = 'Check the values against your own copy of the edition that applies.';

/** Supply voltages are judged by a week; said with each result. */
export const weekOfTenMinutes =
  'The standard takes 10 min values of one week; a short record is compared with its values, which states no conformity';
