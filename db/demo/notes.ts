import type { StageKey } from './pictures';

/** What the bench writes, a few versions a stage; every other line is for the shop only where it says so. */
export const benchNotes: Record<StageKey, readonly string[]> = {
  lumber: [
    'Your boards are out of the stack. The body comes from one flitch, so front and back are the same tree. I have chalked your order number on both ends.',
    'Two boards looked right and one sounded right. That one is yours. It still reads eleven on the meter, so nothing happens to it before the wood room has had its say.',
  ],
  'wood-room': [
    'Stickered and weighted. It went in at 10.8 per cent and wants to come out near eight. There is nothing to see for about a month, and that is the point.',
    'Turned the pile and put the meter on it again. A slow half per cent a week, which is what we like. Fast drying makes liars of boards.',
    'It has held still for nine days now, so it may leave the wood room. The scale says it lost a little over a tenth of its weight as water.',
  ],
  blanks: [
    'The two leaves are opened and matched. I slid them against each other until the figure met, then marked the centre so that nobody has to guess later.',
    'Top is glued to the back and in the clamps. Even squeeze-out all the way round; it stays there overnight and rests two days before the machine may have it.',
  ],
  machining: [
    'Off the machine. Outline, pockets and the neck seat are in, everything two tenths proud for the hand work. The carve follows your drawing to the line.',
    'I stopped the carve once to look at a knot that turned out to be a shadow. The surface is clean.',
  ],
  'neck-board': [
    'Board is down on the neck. The pins hold it dead on centre, so all I do is tape the edges against squeeze-out and clamp. It stays clamped overnight and then goes back to the wood room for nine days.',
    'Slots are cut to your scale and checked against the rule at the seventh, twelfth and last. The widest miss is two hundredths of a millimetre.',
    'Markers are in and levelled. From the side they catch the light before anything else does.',
  ],
  frets: [
    'Frets pressed, ends rolled. I run my thumb down both edges with my eyes shut; if I can find one, it goes back on the bench.',
    'Levelled and crowned. The straightedge shows no light from the first to the last.',
  ],
  'body-joint': [
    'Neck is in. It went home with hand pressure and held the body up by itself, before any glue. That is how tight it should be.',
    'Sanded through the grades by hand. Under the low lamp there is not one scratch across the grain left.',
  ],
  'pre-paint': [
    'Checked before paint: joint, edges, pockets, every radius. Two pinholes filled, then I looked again the next morning. It may go to the finish room.',
  ],
  'colour-clear': [
    'Colour is on. Two passes into the edge, then I pulled the centre back so that the figure still moves when you tilt it. It gets four clear coats from here, a day apart, and then it hangs for two weeks before anyone is allowed to touch it.',
    'Second clear coat. The booth held at 22 degrees and 48 per cent all day. No dust, no sags.',
    'It hangs. Nothing to photograph for a while: the film has to let go of its solvent before it can be sanded flat.',
  ],
  'sand-buff': [
    'Wet sanded flat. It looks like slate now, which makes people nervous. The shine comes back tomorrow on the wheel.',
    'Buffed. You can read the clock behind me in the lower bout.',
  ],
  'hardware-setup': [
    'Hardware is on, wires are in, everything switches what it should. First strings tonight so that the neck can settle under tension.',
    'First set-up: relief, action and nut slots are where your sheet wants them. I leave it strung for two days and do it all again.',
  ],
  'final-check': [
    'Last look. I go down the list with your sheet beside me and play it for an hour. It will be put in its case tomorrow.',
    'In the case. Turn the key slowly.',
  ],
};

export const shopNotes = [
  'Note for the next bench: the centre line is on the back in pencil, do not sand it off.',
  'Filler dried a shade light on the treble side. Colour will cover it, but keep an eye on it.',
  'Waiting for the knobs. Ordered again on Monday.',
];

export const buyerQuestions = [
  {
    topic: 'finish',
    subject: 'Will the edge stay that dark?',
    text: 'The burst is lovely. Will the edge come out as dark as in the photo, or does the clear lift it?',
    answer:
      'The clear deepens it a little, so what you see is close to the lightest it will be. I can put a photo beside your sample when the second coat is dry.',
  },
  {
    topic: 'wood',
    subject: 'How much does the body weigh?',
    text: 'Could you tell me what the blank weighs now? I am counting on a light one.',
    answer: 'It came off the machine at 1.9 kilos. With everything on it I expect about 3.2 in all.',
  },
  {
    topic: 'setup',
    subject: 'Strings for the set-up',
    text: 'Can it be set up with the gauges I named, even though they are on the heavy side?',
    answer: null,
  },
  {
    topic: 'schedule',
    subject: 'Travelling in spring',
    text: 'I am away for three weeks in spring. Is there a chance that it is ready just then?',
    answer: null,
  },
  {
    topic: 'money',
    subject: 'Second instalment',
    text: 'When is the second instalment due, and may I pay it in two parts?',
    answer: 'It is due when the neck is fretted. Two parts are fine; I have put it on your order.',
  },
  {
    topic: 'finish',
    subject: 'Gloss on the back of the neck',
    text: 'Is it too late to leave the back of the neck without gloss? My hand sticks to it.',
    answer: null,
  },
  {
    topic: 'spec',
    subject: 'Where does the jack go?',
    text: 'On the drawing the jack sits at the end pin. Could it move to the edge?',
    answer: 'Not any more, the hole is in. The angled plug that I put in the case keeps the cable out of your way.',
  },
  {
    topic: 'setup',
    subject: 'Action for slide',
    text: 'I play about a third of the time with a slide. How high can the strings be before it suffers for the rest?',
    answer:
      'I would stay under two millimetres at the twelfth and cut the nut a touch higher. Say stop if that sounds too much.',
  },
  {
    topic: 'wood',
    subject: 'What is the dark line in the board?',
    text: 'In the last photo there is a dark line near the fifth fret. Is that a crack?',
    answer: 'It is a mineral streak, hard as the rest. I tapped along it and pressed a fret right through it.',
  },
  {
    topic: 'finish',
    subject: 'A photograph in daylight',
    text: 'Could somebody take it to the window for one picture?',
    answer: null,
  },
  {
    topic: 'schedule',
    subject: 'May I come and see it?',
    text: 'I pass by in two weeks. May I look in for ten minutes?',
    answer: 'Gladly. Call from the gate, and somebody will bring you to the bench it is on.',
  },
] as const;

/** What the rep asks beside a question, and what the bench answers: read at the shop only. */
export const marginWords = [
  {
    asks: 'Before I promise anything: is there still material on the edge to lighten it?',
    answers: 'A little. I would not go further than one more pass, so do not offer two.',
  },
  {
    asks: 'They asked the same in spring. Can you give me one sentence that settles it?',
    answers: 'It stays within the drawing. Say that, and that I measured it this morning.',
  },
  {
    asks: 'Could it be strung for ten minutes on Wednesday afternoon?',
    answers: 'Strings on, yes. The nut is not done, so nobody plays it.',
  },
] as const;

/** The shop's own phrases for letters. */
export const shopPhrases = [
  { title: 'Where it is now', words: '{owner}, your {instrument} is in {stage} just now.' },
  {
    title: 'Ready window',
    words: 'As things stand we expect it {window}. If that moves, you read it in the diary first.',
  },
  { title: 'I will find out', words: 'Let me ask at the bench. You will have an answer from me today.' },
  { title: 'A photo will follow', words: 'I will ask for a photo in daylight and put it into the diary of {order}.' },
  {
    title: 'Too late to change',
    words: 'That part is made already, so it cannot change any more. What we can still do is this:',
  },
  {
    title: 'Costs and days',
    words: 'That is possible. It would add its price and some days; I send you both to sign before anybody starts.',
  },
] as const;
