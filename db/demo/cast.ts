import type { Role } from '@/lib/access';

/** The invented people of Quillhaven Guitar Works. Every address lies in a reserved domain (RFC 2606). */
export type CastMember = { name: string; role: Role; department: string | null; timeZone: string };

const staff = (name: string, department: string): CastMember => ({
  name,
  role: 'builder',
  department,
  timeZone: 'America/New_York',
});
const rep = (name: string): CastMember => ({ name, role: 'rep', department: null, timeZone: 'America/New_York' });
const client = (role: 'buyer' | 'artist', name: string, timeZone: string): CastMember => ({
  name,
  role,
  department: null,
  timeZone,
});

export const admin: CastMember = {
  name: 'Nadia Brandvold',
  role: 'admin',
  department: null,
  timeZone: 'America/New_York',
};

export const reps = [rep('Ruth Adeyemi'), rep('Oskar Penhallow'), rep('Lucia Tamberlan')];

export const builders = [
  staff('Tove Järvi', 'finish'),
  staff('Ines Barros', 'neck & frets'),
  staff('Bo Lindgren', 'set-up'),
  staff('Amadou Keita', 'wood room'),
  staff('Petra Novotna', 'design & machining'),
  staff('Hollis Wren', 'body & sanding'),
  staff('Yuki Amano', 'buffing'),
  staff('Greer Calloway', 'inspection'),
  staff('Mateus Falcão', 'neck & frets'),
];

export const artists = [
  client('artist', 'Kasimir Roe', 'Europe/London'),
  client('artist', 'Delphine Orsay', 'Europe/Paris'),
];

export const buyers = [
  client('buyer', 'Maren Oyelaran', 'Europe/Lisbon'),
  client('buyer', 'Jonas Okonkwo', 'America/Chicago'),
  client('buyer', 'Tamsin Abara', 'Europe/London'),
  client('buyer', 'Hendrik Voss', 'Europe/Berlin'),
  client('buyer', 'Lena Marchetti', 'Europe/Rome'),
  client('buyer', 'Paz Reyes-Nolan', 'America/Los_Angeles'),
  client('buyer', 'Dara Farrow', 'America/New_York'),
  client('buyer', 'Astrid Lindqvist', 'Europe/Stockholm'),
  client('buyer', 'Rui Castellan', 'America/Sao_Paulo'),
  client('buyer', 'Noor Haddadin', 'Asia/Dubai'),
  client('buyer', 'Eilidh Strachan', 'Europe/London'),
  client('buyer', 'Tomo Kisaragi', 'Asia/Tokyo'),
  client('buyer', 'Wanda Grabowska', 'Europe/Warsaw'),
  client('buyer', 'Silas Thornbury', 'Australia/Sydney'),
  client('buyer', 'Chidi Umeh', 'Africa/Lagos'),
  client('buyer', 'Ottilie Brandt', 'Europe/Vienna'),
];

const firstNames = [
  'Agnes',
  'Bram',
  'Cleo',
  'Dmitri',
  'Esra',
  'Fergus',
  'Gwen',
  'Hakon',
  'Ilse',
  'Jory',
  'Kaia',
  'Leif',
];
const lastNames = [
  'Aldous',
  'Bellweather',
  'Corrigan',
  'Dunmore',
  'Eastlake',
  'Fennimore',
  'Garrow',
  'Holloway',
  'Ivarsson',
];
const zones = ['Europe/London', 'America/New_York', 'Europe/Berlin', 'America/Los_Angeles', 'Asia/Tokyo'];

/** Everybody else who has ordered: as many as there are pairs of names, no two of one name beside each other. */
export const furtherBuyers = Array.from({ length: firstNames.length * lastNames.length }, (_, index) => {
  const round = Math.floor(index / firstNames.length);
  const [first, last] = [firstNames[index % firstNames.length], lastNames[(index + round + 4) % lastNames.length]];
  return client('buyer', `${first} ${last}`, zones[index % zones.length] ?? 'UTC');
});

/** Lets the owner of the first build be looked over the shoulder. */
export const companion = client('buyer', 'Felix Oyelaran', 'Europe/Lisbon');

/** `Maren Oyelaran` has maren.oyelaran@clients.example; staff sit at quillhaven.example. */
export function addressOf({ name, role }: CastMember): string {
  const local = name
    .normalize('NFD')
    .replace(/[^A-Za-z -]/g, '')
    .toLowerCase()
    .replace(/\s+/g, '.');
  return `${local}@${role === 'buyer' || role === 'artist' ? 'clients.example' : 'quillhaven.example'}`;
}
