// The scenario of the demo workbook: invigilation and labs of an exam week at a college that does not exist.
// Everything is invented and drawn from a fixed seed, so that the file is the same each time.

/** mulberry32, public domain. */
function random(seed) {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

const PEOPLE = [
  ['Alma Thornbury', 4], ['Basil Okonjo', 3], ['Carys Wren', 4], ['Dov Pettifer', 3], ['Edda Lindqvist', 4],
  ['Farid Moncrieff', 3], ['Greer Solway', 2], ['Hanne Fairlie', 4], ['Idris Calloway', 3], ['Juno Ashdown', 3],
  ['Kofi Brandreth', 4], ['Lotte Merriman', 2], ['Milo Tarrant', 3], ['Nesta Quill', 4], ['Oskar Penhale', 3],
  ['Petra Vane', 3], ['Quentin Rook', 1], ['Rhian Marsh', 4], ['Sunil Harrow', 3], ['Thea Lockett', 3],
  ['Umar Felling', 2], ['Verity Stroud', 4],
];

const DAYS = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri'];
const TIMES = ['09:00', '13:00', '18:00'];
const PAPERS = [
  'Algebra', 'Botany', 'Chemistry', 'Drama theory', 'Economics', 'French', 'Geology', 'History', 'Islamic art',
  'Journalism', 'Kinesiology', 'Latin', 'Mechanics', 'Nursing', 'Optics', 'Philosophy', 'Rhetoric', 'Statistics',
  'Thermodynamics', 'Urban design', 'Viola', 'Weaving', 'Zoology', 'Astronomy', 'Biochemistry', 'Civics', 'Dance notation',
  'Ethics', 'Fluid dynamics', 'German', 'Harmony', 'Invertebrates', 'Jurisprudence', 'Kinetics', 'Logic', 'Metallurgy',
];
/** Evening labs need someone with the first-aid certificate; few have it. */
const LABS = ['Dissection lab', 'Furnace lab', 'Solvents lab', 'Laser lab'];
/** The oral needs people who speak the language. */
const FRENCH_SPEAKERS = ['Carys Wren', 'Juno Ashdown'];
const FIRST_AIDERS = ['Greer Solway', 'Lotte Merriman', 'Quentin Rook'];

/** The tables as rows of cells, headings first. */
export function scenario() {
  const draw = random(20_261);
  const duties = [];
  PAPERS.forEach((paper, i) => {
    const day = DAYS[i % DAYS.length];
    const time = TIMES[Math.floor(i / DAYS.length) % TIMES.length];
    const hall = draw() < 0.3;
    duties.push([`${paper} paper`, hall ? 2 : 1, 1 + Math.floor(draw() * 3), `${day} ${time}`, day]);
  });
  LABS.forEach((lab, i) => duties.push([lab, i === 0 ? 2 : 1, 1, `${DAYS[i]} 18:00`, DAYS[i]]));
  LABS.slice(0, 2).forEach((lab, i) => duties.push([`${lab}, repeat`, 1, 2, `${DAYS[i + 2]} 09:00`, DAYS[i + 2]]));

  duties.push(['French oral', 3, 1, 'Wed 13:00', 'Wed']);

  const pairs = [];
  for (const [duty] of duties) {
    const only = duty.includes('lab') ? FIRST_AIDERS : duty === 'French oral' ? FRENCH_SPEAKERS : null;
    for (const [person] of PEOPLE) {
      if (only === null ? draw() < 0.28 : only.includes(person)) pairs.push([duty, person]);
    }
  }
  return {
    Pairs: [['Duty', 'Person'], ...pairs],
    People: [['Person', 'Maximum'], ...PEOPLE],
    Duties: [['Duty', 'Need', 'Priority', 'Slot', 'Group'], ...duties],
    Rules: [
      ['Rule', 'Duty', 'Person', 'Value'],
      ['Fixed', 'Algebra paper', pairs.find(([duty]) => duty === 'Algebra paper')[1], ''],
      ['Barred', 'Nursing paper', 'Nesta Quill', ''],
      ['Away', '', 'Hanne Fairlie', 'Fri'],
      ['Away', '', 'Kofi Brandreth', 'Mon 09:00'],
      ['Limit', 'Wed', '', 2],
      ['Limit', 'Thu', 'Alma Thornbury', 1],
    ],
  };
}
