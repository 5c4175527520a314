import { describe, expect, test } from 'vitest';
import { accessTable, can, roles, standings, type Action } from '@/lib/access';

/** The letters of a cell below, in its order: o owner, c companion, a assigned, n none. */
const letters = { owner: 'o', companion: 'c', assigned: 'a', none: 'n' };

// PRODUCT.md, section 4, cell by cell: who may do what to a build, by what they are to it.
const expected = `
action                      buyer  artist builder rep    admin
diary.read                  oc--   oc--   --a-    --a-   --a-
diary.read_shop_side        ----   ----   --a-    --a-   --a-
entry.post                  ----   ----   --a-    --a-   --a-
photo.send                  o---   o---   --a-    --a-   --a-
entry.edit_own              ----   ----   --a-    --a-   --a-
entry.edit_any              ----   ----   ----    --a-   --a-
entry.release               ----   ----   ----    --a-   --a-
stage.move                  ----   ----   --a-    --a-   --a-
spec.read                   o---   o---   --a-    --a-   --a-
spec.edit                   ----   ----   --a-    --a-   --a-
spec.send                   ----   ----   ----    --a-   --a-
change.ask                  o---   o---   ----    ----   ----
change.offer                ----   ----   ----    --a-   --a-
sign_off.read               o---   o---   --a-    --a-   --a-
sign_off.ask                ----   ----   ----    --a-   --a-
sign_off.answer             o---   o---   ----    ----   ----
proof.link                  ----   ----   --a-    --a-   --a-
check.run                   ----   ----   --a-    --a-   --a-
check.tell                  ----   ----   ----    --a-   --a-
build.finish                ----   ----   --a-    --a-   --a-
build.ship                  ----   ----   ----    --a-   --a-
contacts.read               ----   ----   ----    --a-   --a-
question.read               o---   o---   --a-    --a-   --a-
question.read_reps_only     o---   o---   ----    --a-   --a-
question.ask                o---   o---   ----    ----   ----
question.answer_with_pen    ----   ----   --a-    --a-   --a-
question.answer_any         ----   ----   ----    --a-   --a-
question.end                o---   o---   ----    --a-   --a-
pen.pass                    ----   ----   --a-    --a-   --a-
pen.pass_any                ----   ----   ----    --a-   --a-
margin.read                 ----   ----   --a-    --a-   --a-
margin.write                ----   ----   --a-    --a-   --a-
phrase.keep                 ----   ----   ---n    ---n   ---n
phrase.keep_shop            ----   ----   ----    ---n   ---n
away.set                    ----   ----   ---n    ---n   ---n
companion.manage            o---   o---   ----    ----   ----
access.read_events          o---   o---   ----    --a-   --a-
build.hold                  ----   ----   ----    --a-   --a-
build.step_in               ----   ----   ----    ----   ---n
people.manage               ----   ----   ----    ----   ---n
assignment.manage           ----   ----   ----    ----   ---n
builds.count                ----   ----   ----    ----   ---n
floor.read                  ----   ----   ---n    ---n   ---n
shop.set_up                 ----   ----   ----    ----   ---n
mail.watch                  ----   ----   ----    ----   ---n
own.settings                ---n   ---n   ---n    ---n   ---n
`;

const [header = [], ...rows] = expected
  .trim()
  .split('\n')
  .map((line) => line.split(/ +/));

const isAction = (name: string): name is Action => Object.hasOwn(accessTable, name);

describe('the access table', () => {
  test('has exactly the roles, standings and actions that this test spells out', () => {
    expect(header).toEqual(['action', ...roles]);
    expect(Object.keys(letters)).toEqual([...standings]);
    expect(rows.map(([action]) => action).sort()).toEqual(Object.keys(accessTable).sort());
  });

  test.each(rows.map(([action = '', ...cells]) => ({ action, cells })))(
    '$action is allowed to exactly these standings of each role',
    ({ action, cells }) => {
      if (!isAction(action)) throw new Error(`${action} is not in the table`);
      const allowed = roles.map((role) =>
        standings.map((standing) => (can(role, standing, action) ? letters[standing] : '-')).join(''),
      );
      expect(allowed).toEqual(cells);
    },
  );

  test.each(['diary.write', 'constructor', 'toString', '__proto__', ''])(
    'an action that it does not know is an error, not a no and not a yes: %j',
    (action) => {
      const ask: (role: 'admin', standing: 'none', action: never) => boolean = can;
      expect(() => Reflect.apply(ask, null, ['admin', 'none', action])).toThrow(RangeError);
    },
  );
});
