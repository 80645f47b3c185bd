import { canonicalJson } from './canonical-json';

describe('canonical JSON', () => {
  it('is the same whatever the order of names', () => {
    expect(canonicalJson({ b: [1, { d: null, c: true }], a: 'x' })).toBe('{"a":"x","b":[1,{"c":true,"d":null}]}');
    expect(canonicalJson({ a: 'x', b: [1, { c: true, d: null }] })).toBe('{"a":"x","b":[1,{"c":true,"d":null}]}');
  });

  it('reads back to the same bits', () => {
    const numbers = [0.1 + 0.2, 1 / 3, 5e-324, 1.7976931348623157e308, 123456789012345680000, -4.35];
    expect(JSON.parse(canonicalJson(numbers))).toEqual(numbers);
  });

  it('leaves out a name without a value', () => {
    expect(canonicalJson({ a: undefined, b: 1 })).toBe('{"b":1}');
  });

  // RFC 8785, section 3.2.3: the sorting example's names.
  it('sorts names by their UTF-16 code units', () => {
    const names = ['\u20ac', '\r', '\ufb33', '1', '\ud83d\ude00', '\u0080', '\u00f6'];
    const sorted = ['\r', '1', '\u0080', '\u00f6', '\u20ac', '\ud83d\ude00', '\ufb33'];
    const text = canonicalJson(Object.fromEntries(names.map((name) => [name, 0])));
    expect(text).toBe(`{${sorted.map((name) => `${JSON.stringify(name)}:0`).join(',')}}`);
  });

  it('refuses what JSON cannot hold', () => {
    for (const value of [NaN, Infinity, undefined, new Float64Array(2), 1n])
      expect(() => canonicalJson({ value: [value] })).toThrow(TypeError);
  });
});
