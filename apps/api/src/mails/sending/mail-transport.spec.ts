import { describe, expect, it } from 'vitest';
import { outcomeOf } from './mail-transport.js';

const failure = (fields: object) => Object.assign(new Error('Message failed'), fields);

// RFC 5321, 4.2.1: 4yz asks to try again, 5yz not to; 4.2.3 names the codes.
describe('a refusal', () => {
  it.each([
    ['550 for a recipient', { responseCode: 550, command: 'RCPT TO' }, 'refused'],
    ['552 for the message', { responseCode: 552, command: 'DATA' }, 'refused'],
    ['450 for a recipient', { responseCode: 450, command: 'RCPT TO' }, 'delayed'],
    ['451 for the message', { responseCode: 451, command: 'DATA' }, 'delayed'],
    ['421 at the beginning', { responseCode: 421, command: 'CONN' }, 'delayed'],
    ['503 for commands out of order', { responseCode: 503, command: 'RCPT TO' }, 'delayed'],
    ['535 for the sign-in', { responseCode: 535, command: 'AUTH PLAIN' }, 'delayed'],
    ['a connection refused', { code: 'ESOCKET' }, 'delayed'],
  ])('by %s', (_, fields, kind) => {
    expect(outcomeOf(failure(fields)).kind).toBe(kind);
  });

  it('keeps the words of the server, on one line', () => {
    const outcome = outcomeOf(
      failure({ responseCode: 550, command: 'RCPT TO', response: '550 No\r\nsuch user' }),
    );
    expect(outcome).toEqual({ kind: 'refused', reason: '550 No such user' });
  });
});
