import { describe, expect, test } from 'vitest';
import { penHolder } from '@/lib/questions/pen-holder';

const bo = { id: 'bo', role: 'builder', department: 'neck & frets' } as const;
const ada = { id: 'ada', role: 'builder', department: 'neck & frets' } as const;
const pia = { id: 'pia', role: 'builder', department: 'finish' } as const;
const ruth = { id: 'ruth', role: 'rep', department: null } as const;
const sol = { id: 'sol', role: 'rep', department: 'neck & frets' } as const;
const root = { id: 'root', role: 'admin', department: 'neck & frets' } as const;

const neck = { answeredBy: 'department', department: 'neck & frets' } as const;
const money = { answeredBy: 'rep', department: null } as const;

describe('who holds the pen on a new question', () => {
  test.each([
    { topic: neck, staff: [ruth, pia, bo], holder: 'bo', why: 'the builder of the department' },
    { topic: neck, staff: [ada, bo], holder: 'ada', why: 'of two builders, the one put on the build first' },
    { topic: neck, staff: [pia, ruth], holder: 'ruth', why: 'a rep when the department is not on the build' },
    { topic: neck, staff: [sol, bo], holder: 'bo', why: 'a builder before a rep of the same department' },
    { topic: neck, staff: [pia], holder: null, why: 'nobody rather than a builder of another department' },
    { topic: neck, staff: [root], holder: null, why: 'never an admin who stepped in' },
    { topic: neck, staff: [], holder: null, why: 'nobody on a build without staff' },
    { topic: money, staff: [bo, pia, ruth, sol], holder: 'ruth', why: 'the first rep, whoever came before' },
    { topic: money, staff: [bo, pia], holder: null, why: 'never a builder on a topic of the reps' },
  ])('$why', ({ topic, staff, holder }) => {
    expect(penHolder(topic, staff)).toBe(holder);
  });

  test('a builder without a department gets no topic of the reps, though neither names a department', () => {
    expect(penHolder(money, [{ ...bo, department: null }, ruth])).toBe('ruth');
  });
});
