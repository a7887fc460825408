import { describe, expect, it } from 'vitest';

import { loadEnv } from '@/server/env';

describe('the environment', () => {
  it('can be empty: everything has a value for a first start', () => {
    expect(loadEnv({})).toMatchObject({
      NODE_ENV: 'development',
      PORT: 4180,
      HOST: '127.0.0.1',
      PUBLIC_URL: 'http://127.0.0.1:4180',
      TRUST_PROXY: 0,
    });
  });

  it('makes links from the address that people use, without a slash at its end', () => {
    expect(loadEnv({ PUBLIC_URL: 'https://yards.example/' }).PUBLIC_URL).toBe('https://yards.example');
    expect(loadEnv({ PORT: '5000' }).PUBLIC_URL).toBe('http://127.0.0.1:5000');
  });

  it('takes an empty value for none', () => {
    expect(loadEnv({ PORT: '', PUBLIC_URL: '', DATABASE_URL: '' })).toMatchObject({
      PORT: 4180,
      PUBLIC_URL: 'http://127.0.0.1:4180',
    });
  });

  it.each([
    ['PORT', 'many'],
    ['PORT', '70000'],
    ['NODE_ENV', 'staging'],
    ['DATABASE_URL', 'localhost/yardbell'],
    ['PUBLIC_URL', 'yards'],
    ['PUBLIC_URL', 'ftp://yards.example'],
    ['TRUST_PROXY', 'yes'],
    ['LOG_LEVEL', 'loud'],
  ])('names the variable that is not right: %s=%s', (name, value) => {
    expect(() => loadEnv({ [name]: value })).toThrow(new RegExp(`The environment is not right:\\s+${name}: `));
  });

  it('names all that are not right at once', () => {
    expect(() => loadEnv({ PORT: 'many', DATABASE_URL: 'none' })).toThrow(/PORT: [^]*DATABASE_URL: /);
  });
});
