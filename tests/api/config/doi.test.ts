import { describe, expect, it } from 'vitest';
import { testConfig } from '#tests/support/test-app.ts';

const agency = { DATACITE_URL: 'https://api.datacite.org/', DATACITE_USER: 'EVEN.BEAM', DATACITE_PASSWORD: 'open sesame', DOI_PREFIX: '10.1234' };
const configWith = (more: Record<string, string>) => testConfig('postgres://127.0.0.1/none', more);

describe('the settings of the agency', () => {
  it('are all four or none; none means that no DOI is registered', () => {
    expect(configWith({}).doi).toBeNull();
    expect(configWith(agency).doi).toEqual({ url: 'https://api.datacite.org', user: 'EVEN.BEAM', password: 'open sesame', prefix: '10.1234' });
    for (const name of Object.keys(agency)) expect(() => configWith({ ...agency, [name]: '' })).toThrow('set together or not at all');
  });

  it('must hold a prefix of DOIs, and the password is never shown', () => {
    expect(() => configWith({ ...agency, DOI_PREFIX: '11.22/33' })).toThrow('DOI_PREFIX = "11.22/33": must be a DOI prefix');
    expect(() => configWith({ ...agency, DATACITE_USER: '' })).toThrow(expect.not.objectContaining({ message: expect.stringContaining('sesame') as string }) as Error);
  });

  it('refuse the local stand-in for a public registry', () => {
    expect(() => configWith({ ...agency, DATACITE_URL: 'http://127.0.0.1:9', PUBLIC_URL: 'https://evenbeam.example', GOOGLE_AUTHORIZATION_URL: 'https://accounts.example/authorize' })).toThrow('DOIs go to the local stand-in');
  });
});
