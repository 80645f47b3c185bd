import { pageNonce } from './page-nonce';

const ADDRESS = 'https://desk.example/widget/tarebeam-form.js';

function page(markup: string): Document {
  return new DOMParser().parseFromString(markup, 'text/html');
}

describe('pageNonce', () => {
  it('takes the nonce of the script that loaded the form', () => {
    const nonce = pageNonce(
      page(`<script src="/other.js" nonce="other"></script><script src="${ADDRESS}" nonce="abc"></script>`),
      ADDRESS,
    );
    expect(nonce).toBe('abc');
  });

  it('prefers what a form says itself', () => {
    const nonce = pageNonce(
      page(`<script src="${ADDRESS}" nonce="abc"></script><tarebeam-form nonce="own"></tarebeam-form>`),
      ADDRESS,
    );
    expect(nonce).toBe('own');
  });

  it('finds none where none is given', () => {
    expect(pageNonce(page(`<script src="${ADDRESS}"></script><tarebeam-form></tarebeam-form>`), ADDRESS)).toBeNull();
  });
});
