/** A factor between two units by which readings may be off. */
export interface UnitFactor {
  /** What a wrong reading is, divided by what it should be. */
  readonly factor: number;
  /** What a wrong reading is multiplied by to be put right. */
  readonly undo: number;
  readonly likely: string;
  /** log(factor). */
  readonly shift: number;
}

/**
 * Factors between units that are often mixed, with the words for either way round. Exact by definition: 1 ft =
 * 0.3048 m, 1 lb = 0.45359237 kg, 1 in = 25.4 mm (international yard and pound agreement, 1959).
 */
const pairs: readonly { readonly times: number; readonly parts: number; readonly likely: readonly [string, string] }[] =
  [
    { times: 1 / 0.3048, parts: 0.3048, likely: ['feet among metres', 'metres among feet'] },
    { times: 1 / 0.45359237, parts: 0.45359237, likely: ['pounds among kilograms', 'kilograms among pounds'] },
    { times: 25.4, parts: 1 / 25.4, likely: ['millimetres among inches', 'inches among millimetres'] },
    {
      times: 10,
      parts: 0.1,
      likely: [
        'a slipped decimal mark, or millimetres among centimetres',
        'a slipped decimal mark, or centimetres among millimetres',
      ],
    },
    {
      times: 1000,
      parts: 0.001,
      likely: [
        'millimetres among metres, or kilograms among tonnes',
        'metres among millimetres, or tonnes among kilograms',
      ],
    },
  ];

export const unitFactors: readonly UnitFactor[] = pairs.flatMap(({ times, parts, likely }) => [
  { factor: times, undo: parts, likely: likely[0], shift: Math.log(times) },
  { factor: parts, undo: times, likely: likely[1], shift: -Math.log(times) },
]);

export const nearestFactor = (off: number): UnitFactor =>
  unitFactors.reduce((a, b) => (Math.abs(off - b.shift) < Math.abs(off - a.shift) ? b : a));
