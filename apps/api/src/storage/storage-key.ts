const segment = /^[a-zA-Z0-9][a-zA-Z0-9._-]*$/;

/**
 * Returns `key` when it is a relative path of plain names: letters, digits, dot, dash and underscore, none
 * beginning with a dot, so that no key can leave the store or reach its own files.
 * @throws RangeError otherwise
 */
export function checkedKey(key: string): string {
  if (key.length > 500 || !key.split('/').every((part) => segment.test(part))) {
    throw new RangeError(`Not a storage key: ${JSON.stringify(key)}`);
  }
  return key;
}

/**
 * Returns `prefix` when it is a key with a slash at its end.
 * @throws RangeError otherwise
 */
export function checkedPrefix(prefix: string): string {
  if (!prefix.endsWith('/')) throw new RangeError(`Not the prefix of a folder: ${prefix}`);
  checkedKey(prefix.slice(0, -1));
  return prefix;
}
