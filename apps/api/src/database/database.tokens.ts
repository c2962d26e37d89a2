/** Injects the typed database (`Database` of the db package). */
export const DATABASE = Symbol('DATABASE');

/** Injects the connection pool under it (`pg.Pool`). */
export const POOL = Symbol('POOL');
