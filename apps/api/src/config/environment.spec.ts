import { describe, expect, it } from 'vitest';
import { AppConfig } from './app-config.js';
import { EnvironmentFaults, readEnvironment } from './environment.js';

const needed = {
  DATABASE_URL: 'postgresql://app@127.0.0.1:5432/app',
  DATA_DIR: '/var/lib/overtally',
  SESSION_SECRET: 'x'.repeat(32),
};

describe('the environment', () => {
  it('needs three values and fills in the rest', () => {
    const config = new AppConfig(readEnvironment(needed));
    expect(config).toMatchObject({
      port: 4310,
      host: '127.0.0.1',
      publicUrl: 'http://127.0.0.1:4310',
      maxUploadBytes: 8192 * 1024 * 1024,
      worker: 'embedded',
      demo: false,
      webDist: null,
      storage: { kind: 'disk', folder: '/var/lib/overtally/storage' },
    });
    expect(config.isHttps).toBe(false);
  });

  it('takes an empty value for absent', () => {
    expect(readEnvironment({ ...needed, PORT: '', WEB_DIST: '', ADMIN_EMAIL: '' }).PORT).toBe(4310);
  });

  it('names every fault together and repeats no value', () => {
    const read = () =>
      readEnvironment({ PORT: 'eighty', SESSION_SECRET: 'too short', ADMIN_EMAIL: 'a@example.com' });
    expect(read).toThrow(EnvironmentFaults);
    for (const name of ['PORT', 'DATABASE_URL', 'DATA_DIR', 'SESSION_SECRET', 'ADMIN_PASSWORD']) {
      expect(read).toThrow(name);
    }
    expect(read).not.toThrow(/too short|eighty/);
  });

  it('puts an IPv6 host in brackets', () => {
    const config = new AppConfig(readEnvironment({ ...needed, HOST: '::' }));
    expect(config.publicUrl).toBe('http://[::]:4310');
    expect(new URL(config.publicUrl).port).toBe('4310');
  });

  it.each([
    [{}, false],
    [{ PUBLIC_URL: 'https://lab.example' }, ['loopback']],
    [{ PUBLIC_URL: 'https://lab.example', TRUST_PROXY: '0' }, 0],
    [{ TRUST_PROXY: '2' }, 2],
    [{ TRUST_PROXY: 'loopback, 10.0.0.2,fd00::/8' }, ['loopback', '10.0.0.2', 'fd00::/8']],
  ])('trusts a proxy that is named, or behind TLS one on this machine: %j', (given, trusted) => {
    expect(new AppConfig(readEnvironment({ ...needed, ...given })).trustProxy).toEqual(trusted);
  });

  it.each(['everybody', '10.0.0.2/33', '10.0.0.2/8/8', '-1', '10.0.0'])(
    'refuses the proxy %s',
    (TRUST_PROXY) => {
      expect(() => readEnvironment({ ...needed, TRUST_PROXY })).toThrow(/TRUST_PROXY: give the number/);
    },
  );

  it('knows TLS by the public address and drops the slash at its end', () => {
    const config = new AppConfig(readEnvironment({ ...needed, PUBLIC_URL: 'https://lab.example/' }));
    expect(config).toMatchObject({ publicUrl: 'https://lab.example', isHttps: true });
  });

  it('takes a bucket for storage', () => {
    const s3 = {
      S3_ENDPOINT: 'https://s3.lab.example',
      S3_BUCKET: 'captures',
      S3_REGION: 'eu-central-1',
      S3_ACCESS_KEY_ID: 'id',
      S3_SECRET_ACCESS_KEY: 'secret',
      S3_FORCE_PATH_STYLE: 'on',
    };
    expect(new AppConfig(readEnvironment({ ...needed, STORAGE: 's3', ...s3 })).storage).toEqual({
      kind: 's3',
      endpoint: 'https://s3.lab.example',
      bucket: 'captures',
      region: 'eu-central-1',
      accessKeyId: 'id',
      secretAccessKey: 'secret',
      forcePathStyle: true,
    });
  });

  it('names what a bucket lacks together with other faults', () => {
    const read = () => readEnvironment({ ...needed, PORT: 'eighty', STORAGE: 's3', S3_BUCKET: 'captures' });
    for (const name of ['S3_ENDPOINT', 'S3_REGION', 'S3_ACCESS_KEY_ID', 'S3_SECRET_ACCESS_KEY'])
      expect(read).toThrow(`${name}: STORAGE=s3 needs it`);
    expect(read).toThrow('PORT');
    expect(read).not.toThrow('S3_BUCKET');
    expect(() => readEnvironment({ ...needed, STORAGE: 'tape' })).toThrow('STORAGE');
  });
});
