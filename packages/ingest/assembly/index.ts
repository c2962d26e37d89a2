export { parseRows } from './rows';
export { decode16, decode24, decode32, decode8 } from './codes';
