import { describe, expect, test } from 'vitest';
import { routeQuestion, routeWords, type Candidate, type RoutingTopic } from '@/lib/questions/route-question';

const person = (name: string, over: Partial<Candidate>): Candidate => ({
  id: name.toLowerCase(),
  name,
  role: 'builder',
  department: null,
  reaches: true,
  isAway: false,
  hasLeft: false,
  ...over,
});

const bo = person('Bo', { department: 'neck' });
const ines = person('Ines', { department: 'neck' });
const tove = person('Tove', { department: 'finish' });
const ruth = person('Ruth', { role: 'rep' });
const oskar = person('Oskar', { role: 'rep' });
const nadia = person('Nadia', { role: 'admin' });

const away = (one: Candidate) => ({ ...one, isAway: true });
const left = (one: Candidate) => ({ ...one, hasLeft: true });
const outside = (one: Candidate) => ({ ...one, reaches: false });

const neck: RoutingTopic = { answeredBy: 'department', department: 'neck', repsOnly: false };
const delivery: RoutingTopic = { answeredBy: 'rep', department: null, repsOnly: false };
const money: RoutingTopic = { answeredBy: 'rep', department: null, repsOnly: true };

type Row = {
  when: string;
  topic: RoutingTopic;
  onBuild: Candidate[];
  lead?: Candidate;
  fallback?: Candidate;
  holder: string | null;
  passedOver?: string;
};

// The order of issue and PRODUCT.md: the department's builder on this build, its lead, the rep, the admin's fallback.
const table: Row[] = [
  { when: 'the department is on the build', topic: neck, onBuild: [ruth, tove, bo], lead: ines, holder: 'Bo' },
  { when: 'two of it are, the first put on it', topic: neck, onBuild: [ines, bo, ruth], holder: 'Ines' },
  {
    when: 'the first is out of office, the second',
    topic: neck,
    onBuild: [away(bo), ines, ruth],
    holder: 'Ines',
    passedOver: 'Bo away',
  },
  { when: 'none of it is, its lead', topic: neck, onBuild: [ruth, tove], lead: bo, holder: 'Bo' },
  {
    when: 'the lead does not reach the build, the rep',
    topic: neck,
    onBuild: [ruth],
    lead: outside(bo),
    holder: 'Ruth',
    passedOver: 'Bo off_build',
  },
  {
    when: 'builder and lead are one person and out, the rep, and they are named once',
    topic: neck,
    onBuild: [away(bo), ruth],
    lead: away(bo),
    holder: 'Ruth',
    passedOver: 'Bo away',
  },
  {
    when: 'the lead has left the shop, the rep',
    topic: neck,
    onBuild: [ruth],
    lead: left(bo),
    holder: 'Ruth',
    passedOver: 'Bo left',
  },
  { when: 'it is the reps’ topic, never the builder', topic: delivery, onBuild: [bo, ruth], lead: bo, holder: 'Ruth' },
  {
    when: 'the first rep is out, the second',
    topic: delivery,
    onBuild: [away(ruth), oskar],
    holder: 'Oskar',
    passedOver: 'Ruth away',
  },
  { when: 'there is no rep, the fallback', topic: delivery, onBuild: [bo], fallback: nadia, holder: 'Nadia' },
  {
    when: 'the fallback does not reach the build, nobody',
    topic: delivery,
    onBuild: [bo],
    fallback: outside(nadia),
    holder: null,
    passedOver: 'Nadia off_build',
  },
  {
    when: 'a builder is the fallback for money, nobody',
    topic: money,
    onBuild: [bo],
    fallback: bo,
    holder: null,
    passedOver: 'Bo not_theirs',
  },
  { when: 'a builder is the fallback for delivery, them', topic: delivery, onBuild: [bo], fallback: bo, holder: 'Bo' },
  { when: 'nobody is on the build, nobody', topic: neck, onBuild: [], holder: null },
];

describe('the pen goes to the right hand', () => {
  test.each(table)('when $when', ({ topic, onBuild, lead = null, fallback = null, holder, passedOver = '' }) => {
    const route = routeQuestion({ topic, onBuild, lead, fallback });
    expect(route.holder?.name ?? null).toBe(holder);
    expect(route.passedOver.map(({ name, why }) => `${name} ${why}`).join(', ')).toBe(passedOver);
  });

  test('money never reaches a builder, whoever is on the build, leads or is named', () => {
    const builders = [bo, ines, tove];
    for (const lead of builders)
      for (const fallback of builders)
        expect(routeQuestion({ topic: money, onBuild: builders, lead, fallback }).holder).toBeNull();
  });

  test('a topic of a department for reps only, which the database refuses, reaches no builder either', () => {
    const odd: RoutingTopic = { ...neck, repsOnly: true };
    expect(routeQuestion({ topic: odd, onBuild: [bo, ruth], lead: bo, fallback: null }).holder?.name).toBe('Ruth');
  });

  test('what is kept of it says who was passed over and why', () => {
    const found = routeQuestion({ topic: neck, onBuild: [away(bo), ruth], lead: left(ines), fallback: null });
    expect(routeWords(found)).toBe('Routed by topic. Bo is out of office. Ines has left the shop.');
    const nobody = routeQuestion({ topic: neck, onBuild: [], lead: null, fallback: outside(nadia) });
    expect(routeWords(nobody)).toBe('Nobody on this build can answer. Nadia is not on this build.');
  });
});
