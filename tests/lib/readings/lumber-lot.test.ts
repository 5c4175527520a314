import { describe, expect, test } from 'vitest';
import { noBoard, readLot, type TypedBoard } from '@/lib/readings/lumber-lot';
import { byProvenance, cell } from '../../support/provenance';
import { readReference } from '../../support/reference';

const board = (over: Partial<TypedBoard>): TypedBoard => ({ ...noBoard, ...over });

describe('a lot of lumber as it is typed', () => {
  // Source: NHLA measuring rules as given by the American Hardwood Export Council and buying guides.
  const { outside } = byProvenance(readReference('02d_board_feet_tally'));

  test.each(outside)('is tallied as published: $thickness_in_nominal x $width_in x $length_ft_whole', (row) => {
    const typed = board({
      thickness: row.thickness_in_nominal,
      width: `${row.width_in} in`,
      length: `${row.length_ft_whole} ft`,
    });
    expect(readLot([typed])).toMatchObject({
      boardCount: 1,
      talliedBoardFeet: cell(row, 'expected_board_feet'),
      doubts: [{}],
    });
  });

  test('counts each board, and none that is only half typed', () => {
    // 8/4 x 6 in x 8 ft and 4/4 x 7 1/2 in x 8 ft, by thickness x width x length / 144: 8 and 5.
    const lot = readLot([
      board({ thickness: '8/4', width: '6', length: '8' }),
      board({ width: '7 1/2', length: '8' }),
      board({ width: '7' }),
      noBoard,
    ]);
    expect(lot).toMatchObject({ boardCount: 2, exactBoardFeet: 13 });
  });

  // 6 1/2 in is tallied as 7 in in a bundle: 7 x 8 / 12 is 5 whole square feet, where 6 1/2 x 8 / 12 is 4.
  test('a bundle is tallied by widths to the inch', () => {
    expect(readLot([board({ width: '6 1/2', length: '8 ft' })])).toMatchObject({
      talliedBoardFeet: 4,
      bundledBoardFeet: 5,
    });
  });

  test('a board that is shorter than a foot is no part of a tally, and of the exact volume it is', () => {
    expect(readLot([board({ width: '12', length: '0.5' })])).toMatchObject({
      exactBoardFeet: 0.5,
      talliedBoardFeet: 0,
    });
  });

  test.each([
    { over: { thickness: 'thick', width: '6', length: '8' }, field: 'thickness', says: /4\/4/ },
    { over: { thickness: '-1', width: '6', length: '8' }, field: 'thickness', says: /4\/4/ },
    { over: { width: '0', length: '8' }, field: 'width', says: /above 0/ },
    { over: { width: '6', length: '-8' }, field: 'length', says: /above 0/ },
    { over: { width: 'wide', length: '8' }, field: 'width', says: /not a number/ },
    { over: { width: '6', length: '8 mm' }, field: 'length', says: /ft/ },
  ] as const)('says at its field what cannot be meant: $over', ({ over, field, says }) => {
    const lot = readLot([board(over)]);
    expect(lot.boardCount).toBe(0);
    expect(lot.doubts[0]?.[field]).toMatchObject({ kind: 'wrong', sentence: expect.stringMatching(says) });
  });

  test('asks about a count of quarters that was written as inches, and counts it all the same', () => {
    const lot = readLot([board({ thickness: '8', width: '6', length: '8' })]);
    expect(lot.doubts[0]?.thickness).toMatchObject({ kind: 'ask' });
    expect(lot.boardCount).toBe(1);
  });
});
