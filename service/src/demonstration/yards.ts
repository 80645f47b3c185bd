/** Nine member yards: their share of the work, and how their hours compare with the federation's. All invented. */
export interface Yard {
  readonly share: number;
  readonly effect: number;
}

export const yards = {
  'Addercombe Slip': { share: 18, effect: 0.95 },
  'Brack Haven': { share: 15, effect: 1.06 },
  'Cold Stair': { share: 13, effect: 0.99 },
  Dunfleet: { share: 12, effect: 1.11 },
  'Eastmere Basin': { share: 11, effect: 0.91 },
  'Fallow Creek': { share: 10, effect: 1.02 },
  'Gannet Yard': { share: 9, effect: 1.04 },
  Hollinsey: { share: 7, effect: 0.93 },
  'Innisgall Dock': { share: 5, effect: 1.08 },
} as const satisfies Readonly<Record<string, Yard>>;

export type YardName = keyof typeof yards;

export const yardShares = Object.fromEntries(
  Object.entries(yards).map(([name, yard]) => [name, yard.share]),
) as Readonly<Record<YardName, number>>;
