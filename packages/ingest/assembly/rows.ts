import { scan, tail, value } from './number';

const TAB: u32 = 9;
const LF: u32 = 10;
const CR: u32 = 13;
const BLANK: u32 = 32;
const QUOTE: u32 = 34;

/*
 * What is to be read, and what was. Columns follow: for each the address of its values (f64), 0 for one that is not
 * wanted.
 */
const DELIMITER = 0;
const DECIMAL = 4;
const COLUMNS = 8;
/** Column whose values must rise, -1 when there is none. */
const RISING = 12;
/** Address behind the last row. */
const NEXT = 16;
/** Lowest and highest `tail` of the last column. */
const TAIL_LOW = 20;
const TAIL_HIGH = 24;
/** Value of the rising column in the last row. */
const RISEN = 32;
const ADDRESSES = 40;

function skipBlanks(from: usize, delimiter: u32): usize {
  let p = from;
  let byte = u32(load<u8>(p));
  while (byte === BLANK || (byte === TAB && delimiter !== TAB)) byte = u32(load<u8>(++p));
  return p;
}

/** Address of the end of a cell whose content does not matter, 0 where it is quoted or the text ends. */
function skipCell(from: usize, delimiter: u32): usize {
  let p = from;
  let byte = u32(load<u8>(p));
  while (byte !== delimiter && byte !== LF && byte !== CR && (byte !== TAB || delimiter !== BLANK)) {
    if (byte === QUOTE || byte === 0) return 0;
    byte = u32(load<u8>(++p));
  }
  return p;
}

/**
 * Reads rows of plain numbers until one is of another kind, as far as `end` and up to `limit` rows, of which `filled`
 * are there already. Returns how many rows there are then. A zero byte must stand at `end`, and seven bytes after it.
 */
export function parseRows(plan: usize, from: usize, end: usize, filled: i32, limit: i32): i32 {
  const delimiter = load<u32>(plan, DELIMITER);
  const decimal = load<u32>(plan, DECIMAL);
  const columns = load<i32>(plan, COLUMNS);
  const rising = load<i32>(plan, RISING);
  const addresses = plan + ADDRESSES;
  let tailLow = load<i32>(plan, TAIL_LOW);
  let tailHigh = load<i32>(plan, TAIL_HIGH);
  let risen = load<f64>(plan, RISEN);
  let next = from;
  let row = filled;
  while (row < limit && next < end) {
    let p = next;
    let column = 0;
    let digits = -1;
    let stamp = risen;
    for (; column < columns; column += 1) {
      p = skipBlanks(p, delimiter);
      const address = load<u32>(addresses + (usize(column) << 2));
      if (address === 0) {
        const start = p;
        p = skipCell(p, delimiter);
        if (p === 0 || (p === start && delimiter === BLANK)) break;
        digits = -1;
      } else {
        p = scan(p, decimal);
        if (p === 0) break;
        store<f64>(usize(address) + (usize(row) << 3), value);
        digits = tail;
        if (column === rising) {
          if (!(value > risen)) break;
          stamp = value;
        }
      }
      const end = p;
      p = skipBlanks(p, delimiter);
      const byte = u32(load<u8>(p));
      if (column === columns - 1) {
        if (byte === LF) p += 1;
        else if (byte === CR && u32(load<u8>(p + 1)) === LF) p += 2;
        else break;
      } else if (delimiter === BLANK) {
        if (p === end || byte === LF || byte === CR) break;
      } else {
        if (byte !== delimiter) break;
        p += 1;
      }
    }
    if (column < columns) break;
    if (digits < tailLow) tailLow = digits;
    if (digits > tailHigh) tailHigh = digits;
    risen = stamp;
    next = p;
    row += 1;
  }
  store<u32>(plan, u32(next), NEXT);
  store<i32>(plan, tailLow, TAIL_LOW);
  store<i32>(plan, tailHigh, TAIL_HIGH);
  store<f64>(plan, risen, RISEN);
  return row;
}
