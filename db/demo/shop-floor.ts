import type { StageKey } from './pictures';
import type { Work } from '@/lib/work';

export const departmentNames = [
  'wood room',
  'design & machining',
  'neck & frets',
  'body & sanding',
  'finish',
  'buffing',
  'set-up',
  'inspection',
];

export type DemoStage = { key: StageKey; name: string; department: string; work: Work; usualDays: number };

/** How the shop itself expects a stage to go: working days at best, most likely and at worst, and its calendar waits. */
export type StageOutlook = {
  bestDays: number;
  likelyDays: number;
  worstDays: number;
  minimumWaitDays: number;
  silenceDays: number;
};

/** Calendar days that nobody can hurry: wood settling, a finish curing. */
const minimumWaits: Partial<Record<StageKey, number>> = { 'wood-room': 21, 'colour-clear': 14 };

/** Days an owner can do without news, where there is nothing to photograph for long. */
const longSilences: Partial<Record<StageKey, number>> = { 'wood-room': 30, 'colour-clear': 16, 'final-check': 5 };

export function outlookOf({ key, usualDays }: DemoStage): StageOutlook {
  const likelyDays = Math.max(1, Math.round((usualDays * 5) / 7));
  return {
    bestDays: Math.max(1, Math.round(likelyDays * 0.6)),
    likelyDays,
    worstDays: Math.ceil(likelyDays * 2.2),
    minimumWaitDays: minimumWaits[key] ?? 0,
    silenceDays: longSilences[key] ?? 10,
  };
}

const stage = (key: StageKey, name: string, department: string, work: Work, usualDays: number): DemoStage => ({
  key,
  name,
  department,
  work,
  usualDays,
});

const solid = [
  stage('lumber', 'Lumber', 'wood room', 'wood', 5),
  stage('wood-room', 'Wood room', 'wood room', 'wood', 32),
  stage('blanks', 'Blanks', 'body & sanding', 'body', 7),
  stage('machining', 'Machining', 'design & machining', 'machining', 12),
  stage('neck-board', 'Neck & board', 'neck & frets', 'neck', 13),
  stage('frets', 'Frets', 'neck & frets', 'neck', 7),
  stage('body-joint', 'Body & joint', 'body & sanding', 'body', 10),
  stage('pre-paint', 'Pre-paint check', 'inspection', 'inspection', 3),
  stage('colour-clear', 'Colour & clear', 'finish', 'finish', 22),
  stage('sand-buff', 'Wet sand & buff', 'buffing', 'buffing', 6),
  stage('hardware-setup', 'Hardware & set-up', 'set-up', 'setup', 5),
  stage('final-check', 'Final check', 'inspection', 'inspection', 2),
];

/** Days a stage takes where a route takes longer over it. */
const slower = (days: Partial<Record<StageKey, number>>) =>
  solid.map((step) => ({ ...step, usualDays: days[step.key] ?? step.usualDays }));

export const demoRoutes = [
  { name: 'Solid body', stages: solid },
  { name: 'Hollow body', stages: slower({ blanks: 11, 'body-joint': 15, 'colour-clear': 26 }) },
  { name: 'Bass', stages: slower({ 'neck-board': 16, 'hardware-setup': 6 }) },
] as const;

export const demoTopics = [
  { id: 'spec', name: 'Spec & drawings', dueHours: 12, answeredBy: 'department', department: 'design & machining' },
  { id: 'wood', name: 'Wood & neck', dueHours: 8, answeredBy: 'department', department: 'neck & frets' },
  { id: 'finish', name: 'Finish & colour', dueHours: 8, answeredBy: 'department', department: 'finish' },
  { id: 'setup', name: 'Set-up & feel', dueHours: 8, answeredBy: 'department', department: 'set-up' },
  { id: 'schedule', name: 'Schedule & delivery', dueHours: 6, answeredBy: 'rep', department: null },
  { id: 'money', name: 'Money', dueHours: 8, answeredBy: 'rep', department: null, repsOnly: true },
  { id: 'artist', name: 'Artist matters', dueHours: 4, answeredBy: 'rep', department: null, repsOnly: true },
] as const;

export const instruments = [
  { name: 'Nightjar baritone', route: 0, scaleLengthIn: 27, body: 'solid' },
  { name: 'Nightjar six', route: 0, scaleLengthIn: 25.5, body: 'solid' },
  { name: 'Heron seven-string', route: 0, scaleLengthIn: 26.5, body: 'solid' },
  { name: 'Sandpiper', route: 0, scaleLengthIn: 24.75, body: 'solid' },
  { name: 'Lantern hollow', route: 1, scaleLengthIn: 25, body: 'hollow' },
  { name: 'Bittern bass', route: 2, scaleLengthIn: 34, body: 'bass' },
] as const;

export const finishes = [
  { name: 'Tidepool burst over figured maple', hex: '#007a84', edgeHex: '#0a2f3a', wood: 'maple' },
  { name: 'Amber wash over ash', hex: '#c98a2b', edgeHex: '#6a3d12', wood: 'ash' },
  { name: 'Oxblood over mahogany', hex: '#86202f', edgeHex: '#3a0d14', wood: 'mahogany' },
  { name: 'Bone white', hex: '#e6dcc0', wood: 'maple' },
  { name: 'Fern stain', hex: '#5b7d38', edgeHex: '#22331a', wood: 'ash' },
  { name: 'Rust burst', hex: '#b3532a', edgeHex: '#3d1a0e', wood: 'mahogany' },
  { name: 'Slate blue', hex: '#34476c', wood: 'ash' },
  { name: 'Damson burst', hex: '#6b3f7e', edgeHex: '#27142f', wood: 'maple' },
  { name: 'Lamp black', hex: '#222226', wood: 'mahogany' },
  { name: 'Lemon chalk', hex: '#e9d64f', wood: 'ash' },
  { name: 'Oiled walnut', hex: '#7c5a3a', wood: 'walnut' },
] as const;
