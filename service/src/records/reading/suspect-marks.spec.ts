import { suspectMarksOf } from './suspect-marks';

const lengths = [9.1, 10.2, 11, 12.4, 9.8, 10.6, 13];

describe('suspect marks', () => {
  it('are numbers of nines or −1 that come back far from the rest, the most frequent first', () => {
    expect(suspectMarksOf([...lengths, 999, 999, 999, -1, -1, -1, -1])).toEqual([
      { mark: '-1', count: 4 },
      { mark: '999', count: 3 },
    ]);
  });

  it('are not numbers that come back less than three times', () => {
    expect(suspectMarksOf([...lengths, 999, 999])).toEqual([]);
  });

  it('are not numbers among the rest', () => {
    expect(suspectMarksOf([8, 9, 9, 9, 10, 11, 7])).toEqual([]);
    expect(suspectMarksOf([-2, -1, -1, -1, 0, 1, 3])).toEqual([]);
  });

  it('are not other numbers, however far', () => {
    expect(suspectMarksOf([...lengths, 1000, 1000, 1000])).toEqual([]);
  });

  it('lie outside the rest where more than half of it is equal', () => {
    expect(suspectMarksOf([5, 5, 5, 5, 6, 99, 99, 99])).toEqual([{ mark: '99', count: 3 }]);
  });
});
