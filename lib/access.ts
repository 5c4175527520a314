/** Who may do what. Which rows a person reaches at all is decided in db/scope.ts; this table says which verbs. */
export const roles = ['buyer', 'artist', 'builder', 'rep', 'admin'] as const;
export type Role = (typeof roles)[number];

/** What somebody is to one build. `none` also stands for everything that concerns no single build. */
export const standings = ['owner', 'companion', 'assigned', 'none'] as const;
export type Standing = (typeof standings)[number];

type Row = Record<Role, readonly Standing[]>;
const nobody: Row = { buyer: [], artist: [], builder: [], rep: [], admin: [] };
const everybody: Row = { buyer: ['none'], artist: ['none'], builder: ['none'], rep: ['none'], admin: ['none'] };
const clientSide = { buyer: ['owner', 'companion'], artist: ['owner', 'companion'] } as const;
const owner = { buyer: ['owner'], artist: ['owner'] } as const;
const assignedStaff = { builder: ['assigned'], rep: ['assigned'], admin: ['assigned'] } as const;
const assignedRep = { rep: ['assigned'], admin: ['assigned'] } as const;

export const accessTable = {
  'diary.read': { ...nobody, ...clientSide, ...assignedStaff },
  'diary.read_shop_side': { ...nobody, ...assignedStaff },
  'entry.post': { ...nobody, ...assignedStaff },
  'photo.send': { ...nobody, ...owner, ...assignedStaff },
  'entry.edit_own': { ...nobody, ...assignedStaff },
  'entry.edit_any': { ...nobody, ...assignedRep },
  'entry.release': { ...nobody, ...assignedRep },
  'stage.move': { ...nobody, ...assignedStaff },
  'spec.read': { ...nobody, ...owner, ...assignedStaff },
  'spec.edit': { ...nobody, ...assignedStaff },
  'spec.send': { ...nobody, ...assignedRep },
  'change.ask': { ...nobody, ...owner },
  'change.offer': { ...nobody, ...assignedRep },
  'sign_off.read': { ...nobody, ...owner, ...assignedStaff },
  'sign_off.ask': { ...nobody, ...assignedRep },
  'sign_off.answer': { ...nobody, ...owner },
  'proof.link': { ...nobody, ...assignedStaff },
  'check.run': { ...nobody, ...assignedStaff },
  'check.tell': { ...nobody, ...assignedRep },
  'build.finish': { ...nobody, ...assignedStaff },
  'build.ship': { ...nobody, ...assignedRep },
  'contacts.read': { ...nobody, ...assignedRep },
  'question.read': { ...nobody, ...owner, ...assignedStaff },
  'question.read_reps_only': { ...nobody, ...owner, ...assignedRep },
  'question.ask': { ...nobody, ...owner },
  'question.answer_with_pen': { ...nobody, ...assignedStaff },
  'question.answer_any': { ...nobody, ...assignedRep },
  'question.end': { ...nobody, ...owner, ...assignedRep },
  'pen.pass': { ...nobody, ...assignedStaff },
  'pen.pass_any': { ...nobody, ...assignedRep },
  'margin.read': { ...nobody, ...assignedStaff },
  'margin.write': { ...nobody, ...assignedStaff },
  'phrase.keep': { ...nobody, builder: ['none'], rep: ['none'], admin: ['none'] },
  'phrase.keep_shop': { ...nobody, rep: ['none'], admin: ['none'] },
  'away.set': { ...nobody, builder: ['none'], rep: ['none'], admin: ['none'] },
  'companion.manage': { ...nobody, ...owner },
  'access.read_events': { ...nobody, ...owner, ...assignedRep },
  'build.hold': { ...nobody, ...assignedRep },
  'build.step_in': { ...nobody, admin: ['none'] },
  'people.manage': { ...nobody, admin: ['none'] },
  'assignment.manage': { ...nobody, admin: ['none'] },
  'builds.count': { ...nobody, admin: ['none'] },
  'floor.read': { ...nobody, builder: ['none'], rep: ['none'], admin: ['none'] },
  'shop.set_up': { ...nobody, admin: ['none'] },
  'mail.watch': { ...nobody, admin: ['none'] },
  'own.settings': everybody,
} satisfies Record<string, Row>;

export type Action = keyof typeof accessTable;

/**
 * Whether a role with this standing on a build may do the action.
 * @throws RangeError for an action that the table does not know
 */
export function can(role: Role, standing: Standing, action: Action): boolean {
  if (!Object.hasOwn(accessTable, action)) throw new RangeError(`no row for ${action} in the access table`);
  const allowed: readonly Standing[] = accessTable[action][role];
  return allowed.includes(standing);
}

export const isStaffRole = (role: Role) => role === 'builder' || role === 'rep' || role === 'admin';
export const isClientRole = (role: Role) => role === 'buyer' || role === 'artist';
