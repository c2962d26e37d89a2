/** Bounds of a form with one file: its text fields are held in memory until the form has ended. */
export const formLimits = { files: 1, fields: 16, parts: 18, fieldSize: 256 * 1024 };
