/** Sign-ins that everybody knows must not stand where others reach them. */
import { describe, expect, it } from 'vitest';
import { demoSetting } from '../src/demo-setting.mjs';

const admin = { ADMIN_EMAIL: 'a@lab.example', ADMIN_PASSWORD: 'a long enough one' };

describe('the demonstration', () => {
  it.each([
    ['127.0.0.1', {}],
    ['::1', {}],
    ['localhost', { PUBLIC_URL: 'http://127.0.0.1:5173' }],
    ['0.0.0.0', { DEMO: 'on' }],
  ])('is there on this machine alone, or when asked for: %s %j', (host, env) => {
    expect(demoSetting(env, host)).toBe('on');
  });

  it.each([
    ['0.0.0.0', {}],
    ['::', {}],
    ['192.168.1.5', {}],
    ['localhost.lab.example', {}],
    ['127.0.0.1', admin],
    ['127.0.0.1', { PUBLIC_URL: 'https://lab.example' }],
    ['127.0.0.1', { DEMO: 'off' }],
  ])('is left out where others reach it or an administrator is named: %s %j', (host, env) => {
    expect(demoSetting(env, host)).toBe('off');
  });
});
