import { expect, it } from 'vitest';
import { memberRecordingId } from './member-recording-id.js';

// RFC 9562, appendix A.4: the name www.example.com in the name space of DNS.
it('makes the UUID of version 5 of the standard', () => {
  const dns = '6ba7b810-9dad-11d1-80b4-00c04fd430c8';
  expect(memberRecordingId(dns, 'www.example.com')).toBe('2ed6657d-e927-568b-95e1-2665a8aea6a2');
});
