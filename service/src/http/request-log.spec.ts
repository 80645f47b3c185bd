import { withoutToken } from './request-log';

describe('a line of the request log', () => {
  it.each([
    ['/api/invitations/2Jq0Z-secret_token', '/api/invitations/…'],
    ['/invitations/2Jq0Z-secret_token?from=mail', '/invitations/…'],
    ['/api/people?limit=5', '/api/people'],
  ])('tells no invitation token and no query: %s', (url, told) => {
    expect(withoutToken(url)).toBe(told);
  });
});
