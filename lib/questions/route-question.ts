import type { Role } from '@/lib/access';

export type RoutingTopic = { answeredBy: 'department' | 'rep'; department: string | null; repsOnly: boolean };

/** Somebody at the shop who might answer. `reaches`: may read the build as things stand now. */
export type Candidate = {
  id: string;
  name: string;
  role: Role;
  department: string | null;
  reaches: boolean;
  isAway: boolean;
  hasLeft: boolean;
};

export type Situation = {
  topic: RoutingTopic;
  /** Who is on the build, in the order in which they were put on it. */
  onBuild: readonly Candidate[];
  /** The lead of the topic's department, and whom the admin named for what nobody else can answer. */
  lead: Candidate | null;
  fallback: Candidate | null;
};

export type PassedOver = { id: string; name: string; why: 'away' | 'left' | 'off_build' | 'not_theirs' };
export type Step = 'department' | 'lead' | 'rep' | 'fallback';

/** `step`: by which rule the holder was found; null when nobody was. */
export type Route = { holder: Candidate | null; step: Step | null; passedOver: PassedOver[] };

/** Why somebody is passed over; null when they can answer. Money and artist matters never reach a builder. */
function whyNot({ topic }: Situation, { role, hasLeft, isAway, reaches }: Candidate): PassedOver['why'] | null {
  if (topic.repsOnly && role === 'builder') return 'not_theirs';
  if (hasLeft) return 'left';
  if (!reaches) return 'off_build';
  return isAway ? 'away' : null;
}

function stepsOf({ topic, onBuild, lead, fallback }: Situation): { step: Step; people: readonly Candidate[] }[] {
  const isOfDepartment = (one: Candidate) => one.role === 'builder' && one.department === topic.department;
  const ofDepartment = topic.answeredBy === 'department' ? onBuild.filter(isOfDepartment) : [];
  return [
    { step: 'department', people: ofDepartment },
    { step: 'lead', people: topic.answeredBy === 'department' && lead ? [lead] : [] },
    { step: 'rep', people: onBuild.filter(({ role }) => role === 'rep') },
    { step: 'fallback', people: fallback ? [fallback] : [] },
  ];
}

/**
 * Who must answer: the builder of the topic's department on this build, else the department's lead, else the rep, else
 * the admin's named fallback, else nobody. A lead or fallback who does not reach the build could not read what they
 * should answer, so they are passed over like whoever is out of office or has left.
 */
export function routeQuestion(situation: Situation): Route {
  const passedOver = new Map<string, PassedOver>();
  for (const { step, people } of stepsOf(situation)) {
    for (const person of people) {
      const why = whyNot(situation, person);
      if (why === null) return { holder: person, step, passedOver: [...passedOver.values()] };
      passedOver.set(person.id, { id: person.id, name: person.name, why });
    }
  }
  return { holder: null, step: null, passedOver: [...passedOver.values()] };
}

const whyWords: Record<PassedOver['why'], string> = {
  away: 'is out of office',
  left: 'has left the shop',
  off_build: 'is not on this build',
  not_theirs: 'is a builder, and this is a matter for the reps',
};

/** What is kept of a route: "Routed by topic. Bo Lindgren is out of office." */
export function routeWords({ holder, passedOver }: Route): string {
  const found = holder ? 'Routed by topic.' : 'Nobody on this build can answer.';
  return [found, ...passedOver.map(({ name, why }) => `${name} ${whyWords[why]}.`)].join(' ');
}
