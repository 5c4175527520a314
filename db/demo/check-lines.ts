type Line = { text: string; photoNeeded?: boolean };
type List = { stageKey: 'pre-paint' | 'final-check'; name: string; lines: Line[] };

const beforePaint: Line[] = [
  { text: 'Sanded to P320 in the direction of the grain, no swirls under the lamp.' },
  { text: 'Edges and corners even, by eye and by hand.' },
  { text: 'No glue left at the joints: wiped with water, nothing stays light.' },
  { text: 'Grain filled and level.', photoNeeded: true },
  { text: 'Neck pocket and cavities masked.' },
  { text: 'Wood reads 6 to 9 % moisture.' },
  { text: 'Order number and finish on the rack tag agree with the spec.' },
];

const beforeTheCase: Line[] = [
  { text: 'No runs, dents or dull spots in the finish, front and back.', photoNeeded: true },
  { text: 'Fret ends smooth: a cloth along both sides catches nowhere.' },
  { text: 'Every note rings, open to the last fret, on every string.' },
  { text: 'Tuners, knobs and switch work, and nothing rattles.' },
  { text: 'Strap pins hold.' },
  { text: 'Serial number and order number agree with the papers.' },
  { text: 'Case holds the tools, the set-up sheet and the papers.', photoNeeded: true },
];

const hollow: Line[] = [
  { text: 'Binding tight all round, no gap at the waist.' },
  { text: 'Inside clean through the sound holes: no dust, no loose braces.' },
];

const bass: Line[] = [{ text: 'Neck straight under full string pull, both sides.' }];

/** What is looked at on a route, before paint and before the case closes. */
export function checkListsOf(routeName: string): List[] {
  const more = routeName === 'Hollow body' ? hollow : [];
  const last = routeName === 'Bass' ? bass : [];
  return [
    { stageKey: 'pre-paint', name: 'Before paint', lines: [...beforePaint, ...more] },
    { stageKey: 'final-check', name: 'Before the case closes', lines: [...beforeTheCase, ...last] },
  ];
}
