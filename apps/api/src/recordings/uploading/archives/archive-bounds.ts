/** Files that one archive may hold. */
export const maxMembers = 1000;
/** Deflate packs to 1/1032 at best (zlib, technical details); captures stay far below, bombs near it. */
export const maxRatio = 250;
/** What unpacks to less is let be, whatever its ratio. */
export const ratioCountsFromBytes = 16 * 2 ** 20;
/** The text that describes a COMTRADE record is held in memory. */
export const maxConfigurationBytes = 4 * 2 ** 20;
