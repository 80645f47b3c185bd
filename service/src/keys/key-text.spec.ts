import { hashKeyText, isKeyOfHash, newKeyText, parseKeyText } from './key-text';

describe('the text of a key', () => {
  it('says by its prefix whom it is for, and carries its public id', () => {
    for (const kind of ['partner', 'embed'] as const) {
      const { text, publicId } = newKeyText(kind);
      expect(text).toMatch(kind === 'partner' ? /^tbk_/ : /^tbe_/);
      expect(parseKeyText(text)).toEqual({ kind, publicId });
    }
  });

  it('is never given twice', () => {
    const texts = new Set(Array.from({ length: 2000 }, () => newKeyText('partner').text));
    expect(texts.size).toBe(2000);
  });

  it('is refused after any one character has changed', () => {
    const { text } = newKeyText('embed');
    for (let place = 0; place < text.length; place += 1) {
      const other = text[place] === 'a' ? 'b' : 'a';
      expect(parseKeyText(text.slice(0, place) + other + text.slice(place + 1))).toBeNull();
    }
  });

  it('is refused when cut, lengthened or surrounded', () => {
    const { text } = newKeyText('partner');
    for (const wrong of ['', text.slice(1), text.slice(0, -1), `${text}a`, ` ${text}`, `${text}\n`])
      expect(parseKeyText(wrong)).toBeNull();
  });

  it('carries the CRC-32 of what stands before it', () => {
    // The six digits were worked out with Python 3's zlib.crc32 on the same text.
    const body = 'tbk_AAAAAAAA_00000000000000000000000000000000';
    expect(parseKeyText(`${body}000000`)).toBeNull();
    expect(parseKeyText(`${body}3wWsbf`)).toEqual({ kind: 'partner', publicId: 'AAAAAAAA' });
  });

  it('is compared by its hash', () => {
    const { text } = newKeyText('partner');
    expect(hashKeyText(text)).toMatch(/^[0-9a-f]{64}$/);
    expect(isKeyOfHash(text, hashKeyText(text))).toBe(true);
    expect(isKeyOfHash(newKeyText('partner').text, hashKeyText(text))).toBe(false);
  });
});
