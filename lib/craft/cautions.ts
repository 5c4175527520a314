import type { SpecGroup } from '../specs/document';
import type { Work } from '../work';

export type CautionKey =
  | 'solvents'
  | 'isocyanates'
  | 'dust'
  | 'spray_room'
  | 'papers'
  | 'string_change'
  | 'truss_rod'
  | 'mains'
  | 'lithium'
  | 'magnets';

export type Caution = {
  key: CautionKey;
  title: string;
  /** Says what to mind and whose word goes before ours. */
  text: string;
  works: readonly Work[];
  groups: readonly SpecGroup[];
};

/** What has to be minded, and where it is said: beside the work it belongs to, and beside the part of the spec. */
export const cautions: readonly Caution[] = [
  {
    key: 'solvents',
    title: 'Finish solvents',
    text: 'Thinners and lacquers give off vapour that harms and burns, and rags with oil on them can catch fire on their own. Follow the safety data sheet of the very product: it says which ventilation, respirator and gloves are needed and how to keep waste. Where local rules ask for more, they go first.',
    works: ['finish'],
    groups: ['finish'],
  },
  {
    key: 'isocyanates',
    title: 'Isocyanates in two-part finishes',
    text: "Hardeners of two-part polyurethanes can make a person allergic for life, and sanding a coat that is not fully cured brings them up again. Only those trained for it mix and spray, with the respirator the product's safety data sheet and the local authority ask for.",
    works: ['finish', 'buffing'],
    groups: ['finish'],
  },
  {
    key: 'dust',
    title: 'Wood, shell and finish dust',
    text: 'Fine dust harms the lungs, some woods and shells irritate the skin, and dust in the air can burn. Take it away where it arises and wear the mask that the safety data sheet and local workplace rules name. Sand shell wet.',
    works: ['wood', 'machining', 'neck', 'body', 'buffing'],
    groups: ['body', 'neck', 'fingerboard'],
  },
  {
    key: 'spray_room',
    title: 'Spray room',
    text: 'Spraying and drying belong in a room that is built and approved for them. The local fire code and the fire authority decide on exhaust, electrical fittings and how much may be kept there.',
    works: ['finish'],
    groups: ['finish'],
  },
  {
    key: 'papers',
    title: 'Papers for woods, skins and shell',
    text: 'Some woods, skins and shells cross a border only with papers (CITES, the Lacey Act, EU rules). Lists change: the shop asks its authority before it buys or ships, and holds the documents with the build.',
    works: ['wood', 'inspection'],
    groups: ['body', 'neck', 'fingerboard', 'case'],
  },
  {
    key: 'string_change',
    title: 'Changing strings',
    text: 'Slacken a string before you cut it, and keep eyes away from its ends. Keep to the gauge and tuning of this sheet: another set changes the pull on the neck, so the set-up has to be done again by someone who knows it.',
    works: ['setup'],
    groups: ['strings'],
  },
  {
    key: 'truss_rod',
    title: 'Truss rod',
    text: 'Turn it by no more than a quarter turn at a time with the right key, and let the neck settle before the next. If it is stiff, or nothing moves, stop and leave it to the shop or a trained repairer: a rod that breaks costs the neck.',
    works: ['neck', 'setup'],
    groups: ['neck', 'strings'],
  },
  {
    key: 'mains',
    title: 'Mains-powered equipment',
    text: 'Play only through equipment that is earthed and tested as local electrical rules ask. Work inside anything that runs on mains is for a licensed electrician, with the plug out.',
    works: ['setup'],
    groups: ['electronics'],
  },
  {
    key: 'lithium',
    title: 'Lithium cells',
    text: "Charge a lithium cell only as its maker says, take it out if it is swollen or hot, and never send it loose. The carrier's rules and those of the countries on the way decide how it may be shipped.",
    works: ['setup', 'inspection'],
    groups: ['electronics', 'case'],
  },
  {
    key: 'magnets',
    title: 'Magnets and pacemakers',
    text: "Pickups and their covers hold strong magnets. Whoever has a pacemaker or another implant keeps the distance their doctor and the implant's maker name, also from loose pickups at the bench.",
    works: ['setup'],
    groups: ['electronics'],
  },
];

/** The cautions that belong beside a kind of work. */
export const cautionsForWork = (work: Work) => cautions.filter((caution) => caution.works.includes(work));

/** The cautions that belong beside a group of the spec. */
export const cautionsForGroup = (group: SpecGroup) => cautions.filter((caution) => caution.groups.includes(group));

/** The caution about papers where one of these materials is marked, else none. */
export const cautionsForMaterials = (materials: readonly { papersMayBeNeeded: boolean }[]) =>
  materials.some((material) => material.papersMayBeNeeded) ? [caution('papers')] : [];

/** The caution of that key. Every key has one. */
export function caution(key: CautionKey): Caution {
  const found = cautions.find((one) => one.key === key);
  if (!found) throw new RangeError(`There is no caution ${key}.`);
  return found;
}
