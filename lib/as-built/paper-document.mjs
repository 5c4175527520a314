import { Document, Image as Picture, Page, Text, View } from '@react-pdf/renderer';
import { createElement as h } from 'react';
import { PaperBoard } from './paper-board.mjs';
import { paper } from './paper-type.mjs';

/** @typedef {import('./paper-plan').PaperPlan} PaperPlan */
/** @typedef {ReadonlyMap<string, Buffer>} Pictures  by their key in the store */

/**
 * The as-built sheet on A4. Plain JavaScript, because a plain node runs it in production.
 * @param {{ plan: PaperPlan, pictures: Pictures, madeAt: Date }} props
 */
export function PaperDocument({ plan, pictures, madeAt }) {
  const { title, author } = plan;
  return h(
    Document,
    { title, author, language: 'en', creationDate: madeAt, pdfVersion: '1.7' },
    ...plan.pages.map((groups, index) =>
      page(plan, [
        index === 0 ? head(plan) : null,
        ...groups.map((group) => groupOf(group, pictures)),
        ...(index === plan.pages.length - 1 ? [setUp(plan), conceded(plan), papers(plan)] : []),
      ]),
    ),
    ...plan.prints.map((prints, index) =>
      page(plan, [
        index === 0 ? h(Text, { style: paper.section }, countWords(plan.photoCount)) : null,
        h(View, { style: paper.grid }, ...prints.map((print) => printOf(print, pictures))),
      ]),
    ),
  );
}

/** @param {number} count */
const countWords = (count) => (count === 1 ? 'One more photo of the diary' : `${count} more photos of the diary`);

/**
 * @param {PaperPlan} plan
 * @param {import('react').ReactNode[]} children
 */
function page({ foot }, children) {
  const number = h(Text, { render: ({ pageNumber, totalPages }) => `Page ${pageNumber} of ${totalPages}` });
  const footLine = h(View, { style: paper.foot, fixed: true }, h(Text, null, foot), number);
  return h(Page, { size: 'A4', style: paper.page }, ...children, footLine);
}

/** @param {PaperPlan} plan */
function head({ over, instrument, facts, board }) {
  return h(
    View,
    null,
    h(Text, { style: paper.over }, over),
    h(Text, { style: paper.title }, 'As signed, as built'),
    h(Text, { style: paper.instrument }, instrument),
    ...facts.map((fact) => h(Text, { style: paper.fact }, fact)),
    board && h(View, { style: paper.board }, h(PaperBoard, { board })),
  );
}

/**
 * One group of the spec: signed beside measured beside proof.
 * @param {PaperPlan['pages'][number][number]} group
 * @param {Pictures} pictures
 */
function groupOf({ name, rows }, pictures) {
  const heads = h(
    View,
    { style: paper.head },
    h(Text, { style: paper.item }, 'Item'),
    h(Text, { style: paper.signed }, 'As signed'),
    h(Text, { style: paper.built }, 'As built'),
    h(Text, { style: paper.proof }, 'Proof'),
  );
  return h(View, null, h(Text, { style: paper.section }, name), heads, ...rows.map((row) => rowOf(row, pictures)));
}

/** @param {string | null} words */
const note = (words) => words && h(Text, { style: paper.note }, words);

/**
 * @param {import('./paper-plan').PlannedRow} row
 * @param {Pictures} pictures
 */
function rowOf(row, pictures) {
  const src = row.picture?.key && pictures.get(row.picture.key);
  return h(
    View,
    { style: paper.row, wrap: false },
    h(Text, { style: [paper.item, paper.strong] }, row.label),
    h(View, { style: paper.signed }, h(Text, null, row.signed), note(row.allowed)),
    h(
      View,
      { style: paper.built },
      row.measured && h(Text, { style: paper.strong }, row.measured),
      note(row.within),
      h(Text, { style: row.isOff ? paper.late : paper.note }, row.standing),
    ),
    h(View, { style: paper.proof }, h(Text, null, row.proof), row.picture && note(`photo ${row.picture.number}`)),
    src ? h(Picture, { src, style: paper.thumb }) : null,
  );
}

/** @param {PaperPlan} plan */
function setUp({ setUp: lines, cautions }) {
  const rows = lines.map(({ label, figures, words, by }) =>
    h(
      View,
      { style: paper.row, wrap: false },
      h(Text, { style: [paper.item, paper.strong] }, label),
      h(Text, { style: paper.signed }, figures),
      h(Text, { style: paper.built }, words),
      h(Text, { style: paper.proof }, by),
    ),
  );
  const texts = cautions.map(({ title, text }) =>
    h(Text, { style: paper.paragraph }, h(Text, { style: paper.strong }, `${title}. `), text),
  );
  return h(View, null, h(Text, { style: paper.section, minPresenceAhead: 60 }, 'Set-up sheet'), ...rows, ...texts);
}

/** @param {PaperPlan} plan */
function conceded({ concessions }) {
  if (concessions.length === 0) return null;
  const rows = concessions.map(({ label, words, by }) =>
    h(
      View,
      { style: paper.paragraph, wrap: false },
      h(Text, { style: paper.strong }, label),
      h(Text, null, words),
      note(by),
    ),
  );
  return h(View, null, h(Text, { style: paper.section, minPresenceAhead: 60 }, 'Let pass by the owner'), ...rows);
}

/** @param {PaperPlan} plan */
function papers({ papers: names, papersSentence }) {
  if (names === '') return null;
  return h(
    View,
    null,
    h(Text, { style: paper.section, minPresenceAhead: 60 }, 'Materials that may need papers'),
    h(Text, { style: [paper.paragraph, paper.strong] }, names),
    h(Text, { style: paper.paragraph }, papersSentence),
  );
}

/**
 * @param {import('./paper-plan').PlannedPrint} print
 * @param {Pictures} pictures
 */
function printOf({ number, key, caption, alt }, pictures) {
  const src = pictures.get(key);
  return h(
    View,
    { style: paper.print, wrap: false },
    src ? h(Picture, { src, style: paper.picture }) : null,
    h(Text, { style: paper.caption }, `${number} · ${caption}`),
    alt === '' ? null : h(Text, { style: paper.alt }, alt),
  );
}
