/**
 * Who may open which door of the build Q-2417, for every kind of viewer in PRODUCT.md section 4.
 *
 *   +  open      -  404, as if it did not exist      x  403, within reach but not theirs      >  sign in first
 */
export const kinds = [
  'anon',
  'owner',
  'otherBuyer',
  'artist',
  'companion',
  'builder',
  'offBuilder',
  'rep',
  'offRep',
  'admin',
  'ended',
] as const;
export type Kind = (typeof kinds)[number];

const everyone = '+++++++++++';
const signedIn = '>+++++++++>';
const adminOnly = '>--------+>';
const ownerOnly = '>+-------->';

export const accessTable: Record<string, string> = {
  'page /': signedIn,
  'page /access': adminOnly,
  'page /access/builds': adminOnly,
  'page /access/builds/[orderNumber]': adminOnly,
  'page /access/mail': adminOnly,
  'page /access/people/[userId]': adminOnly,
  'page /access/record': adminOnly,
  'page /bench': '>----+++++>',
  'page /bench/[orderNumber]': '>----+-+-->',
  'page /bench/[orderNumber]/entries/[entryId]': '>----+-+-->',
  'page /builds': signedIn,
  'page /builds/[orderNumber]': '>+--++-+-->',
  'page /builds/[orderNumber]/people': '>+--++-+-->',
  'page /builds/[orderNumber]/questions': '>+---+-+-->',
  'page /builds/[orderNumber]/questions/new': ownerOnly,
  'page /me': signedIn,
  'page /questions': signedIn,
  'page /questions/[questionId]': '>+---+-+-->',
  'page /sign-in': everyone,
  'page /sign-in/open': everyone,
  'page /sign-in/sent': everyone,
  'page /unsubscribe/[token]': everyone,

  'GET /api/builds/[orderNumber]/diary': '>+--++-+-->',
  'POST /api/builds/[orderNumber]/visits': '>+--++-+-->',
  'POST /api/builds/[orderNumber]/photos': '>x--x+-+-->',
  'POST /api/entries': '>x--x+-+-->',
  'PATCH /api/entries/[entryId]': '>x--x+-+-->',
  'GET /api/photos/[photoId]/[widthPx]': '>+--++-+-->',
  'POST /api/photos/[photoId]': '>----+---->',
  'DELETE /api/photos/[photoId]': '>+++++++++>',
  'POST /api/questions': '>+--xx-x-->',
  'POST /api/questions/[questionId]/letters': '>+---+-+-->',
  'GET /api/questions/[questionId]/letters': '>+---+-+-->',
  'POST /api/time-zone': signedIn,
  'POST /api/unsubscribe/[token]': everyone,
  'GET /api/unsubscribe/[token]': everyone,
  'GET /api/health': everyone,
  'POST /api/auth/[...nextauth]': '-----------',

  'action /access#invite': adminOnly,
  'action /access#assign': adminOnly,
  'action /access#takeOff': adminOnly,
  'action /access/builds/[orderNumber]#stepIn': adminOnly,
  'action /access/mail#retry': adminOnly,
  'action /access/people/[userId]#change': adminOnly,
  'action /access/people/[userId]#endSessions': adminOnly,
  'action /access/people/[userId]#close': adminOnly,
  'action /access/people/[userId]#reopen': adminOnly,
  'action /builds/[orderNumber]#withdraw': '>x--x+-+-->',
  'action /builds/[orderNumber]#release': '>x--xx-+-->',
  'action /builds/[orderNumber]/people#letLookOn': '>+--xx-x-->',
  'action /builds/[orderNumber]/people#stopLookingOn': '>+--xx-x-->',
  // Knocked on last, when the owner has taken the companion off.
  'action /builds/[orderNumber]/people#hold': '>x---x-+-->',
  'action /builds/[orderNumber]/people#openToView': '>x--xx-+-->',
  'action /me#saveMail': signedIn,
  'action /me#saveZone': signedIn,
  'action /me#leaveOthers': signedIn,
  'action /sign-in#ask': everyone,
  'action /unsubscribe/[token]#stopDiaryMail': everyone,
};
