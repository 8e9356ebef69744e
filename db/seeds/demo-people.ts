/** Everybody here is invented. Addresses use the reserved example domains, numbers the reserved fictional range. */
export const DEMO_PASSWORD = 'saltmarsh-harbour-demo';

export const DEMO_SIGN_INS = [
  { role: 'Owner', email: 'ruth@saltmarsh.example.org' },
  { role: 'Front desk', email: 'pat@saltmarsh.example.org' },
  { role: 'Teacher', email: 'greta@saltmarsh.example.org' },
  { role: 'Lead teacher', email: 'ines@saltmarsh.example.org' },
  { role: 'Teacher and guardian', email: 'kwame@saltmarsh.example.org' },
  { role: 'Guardian', email: 'noor@family.example.com' },
  { role: 'Guardian living apart', email: 'sam@family.example.com' },
  { role: 'Student, 13', email: 'ada@family.example.com' },
  { role: 'Adult student', email: 'theo@family.example.com' },
] as const;

export type DemoTeacher = {
  key: string; givenName: string; familyName: string; levelTo: number; kind: 'employee' | 'contractor'; colour: 'petrol' | 'plum' | 'felt' | 'brass';
  /** Weekday → site index, 0 for Quay Street and 1 for Mill Lane. */
  days: Record<number, 0 | 1>;
  rateFactor: number;
};

export const DEMO_TEACHERS: readonly DemoTeacher[] = [
  { key: 'greta', givenName: 'Greta', familyName: 'Dahl', levelTo: 7, kind: 'employee', colour: 'petrol', days: { 1: 0, 2: 0, 4: 0, 6: 0 }, rateFactor: 100 },
  { key: 'kwame', givenName: 'Kwame', familyName: 'Osei', levelTo: 6, kind: 'employee', colour: 'plum', days: { 1: 0, 2: 0, 3: 0, 5: 0 }, rateFactor: 96 },
  { key: 'ines', givenName: 'Ines', familyName: 'Abreu', levelTo: 10, kind: 'employee', colour: 'felt', days: { 2: 0, 3: 0, 4: 0, 5: 0 }, rateFactor: 115 },
  { key: 'lili', givenName: 'Lili', familyName: 'Varga', levelTo: 8, kind: 'employee', colour: 'felt', days: { 1: 0, 2: 0, 3: 0 }, rateFactor: 104 },
  { key: 'rufus', givenName: 'Rufus', familyName: 'Hale', levelTo: 5, kind: 'contractor', colour: 'brass', days: { 2: 0, 4: 0, 5: 0 }, rateFactor: 92 },
  { key: 'maeve', givenName: 'Maeve', familyName: 'Tiernan', levelTo: 6, kind: 'employee', colour: 'petrol', days: { 1: 1, 2: 1, 4: 1 }, rateFactor: 98 },
  { key: 'anders', givenName: 'Anders', familyName: 'Lund', levelTo: 4, kind: 'contractor', colour: 'plum', days: { 1: 1, 2: 1, 3: 1, 6: 0 }, rateFactor: 90 },
  { key: 'priya', givenName: 'Priya', familyName: 'Raman', levelTo: 9, kind: 'employee', colour: 'brass', days: { 2: 1, 3: 1, 5: 1 }, rateFactor: 110 },
  { key: 'tomasz', givenName: 'Tomasz', familyName: 'Wilk', levelTo: 5, kind: 'employee', colour: 'felt', days: { 1: 1, 3: 1, 4: 1 }, rateFactor: 94 },
  { key: 'odile', givenName: 'Odile', familyName: 'Marchand', levelTo: 7, kind: 'contractor', colour: 'plum', days: { 1: 0, 3: 0, 4: 0 }, rateFactor: 101 },
  { key: 'hana', givenName: 'Hana', familyName: 'Sedláková', levelTo: 6, kind: 'employee', colour: 'petrol', days: { 3: 0, 4: 1, 5: 0 }, rateFactor: 97 },
  { key: 'bram', givenName: 'Bram', familyName: 'Verhoef', levelTo: 3, kind: 'employee', colour: 'brass', days: { 1: 0, 5: 1, 6: 0 }, rateFactor: 88 },
];

export const GIVEN_NAMES = [
  'Aoife', 'Jonah', 'Mika', 'Nia', 'Tomas', 'Bea', 'Leo', 'Wren', 'Priya', 'Sam', 'Kit', 'Ines', 'Zoë', 'Célia', 'Hugo', 'Rhona', 'Dara', 'Petra', 'Oisín',
  'Yusuf', 'Elif', 'Søren', 'Maëlle', 'Quim', 'Una', 'Fintan', 'Kaia', 'Viktor', 'Ilse', 'Nils', 'Tilda', 'Xenia', 'Lorcan', 'Greta', 'Bram', 'Orla', 'Jonas',
  'Zora', 'Dario', 'Wanda', 'Amina', 'Callum', 'Mei', 'Ravi', 'Sinéad', 'Teo', 'Farah', 'Noa', 'Iker', 'Saoirse',
] as const;

export const FAMILY_NAMES = [
  'Okafor', 'Reyl', 'Sorel', 'Pell', 'Quist', 'Lindqvist', 'Brandt', 'Ito', 'Farrow', 'Moreau', 'Adair', 'Kestrel', 'Lomax', 'Jessop', 'Hartnoll', 'Grøntved',
  'Ibarra', 'Fallowes', 'Eklund', 'Dunmore', 'Corriston', 'Brekke', 'Aldane', 'Mandeville', 'Nørgaard', 'O’Shee', 'Pellew', 'Quarles', 'Rushmere', 'Strand',
  'Thackway', 'Underhay', 'Vaszary', 'Wintle', 'Yardley', 'Zielonka', 'Achterberg', 'Bellweather', 'Castellane', 'Devereaux', 'Edgecombe', 'Farquharson',
  'Gallowglass', 'Hollister', 'Inchbald', 'Jardine', 'Kilbracken', 'Lazenby', 'Marchbanks', 'Netherwood', 'Oldcastle', 'Pomeroy', 'Quillfeather', 'Ravenscroft',
] as const;
