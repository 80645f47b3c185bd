import fc from 'fast-check';
import { textsToCells } from './cell-blocks';
import { TextBlock } from './text-block';

const texts = fc.array(
  fc.option(
    fc.oneof(
      fc.string({ unit: 'binary', maxLength: 12 }),
      fc.constantFrom('', '"', '\\', '\\"', '","', 'null', ']', '\n', '\ud800', 'Étoile', 'a\\'),
    ),
  ),
  { minLength: 1, maxLength: 30 },
);

describe('a block of texts', () => {
  it('gives the same texts as reading it whole, in whatever order they are asked for', () => {
    fc.assert(
      fc.property(texts, fc.array(fc.nat(), { maxLength: 40 }), (given, order) => {
        const block = new TextBlock(textsToCells(given));
        const rows = [...given.keys(), ...order.map((one) => one % given.length)];
        expect(rows.map((row) => block.at(row))).toEqual(rows.map((row) => given[row]));
      }),
      { numRuns: 1000 },
    );
  });

  it('refuses a row that it does not have', () => {
    const block = new TextBlock(textsToCells(['a', null]));
    expect(() => block.at(2)).toThrow('fewer rows');
    expect(() => block.at(9)).toThrow('fewer rows');
    expect(block.at(1)).toBeNull();
  });
});
