import { LAST_PRIORITY, type Case, type Duty, type Person } from '../cover/case';
import { casePairs, caseSeats } from './casePairs';
import { caseRules } from './caseRules';
import { makeDirectory, type Directory } from './directory';
import { findFixedOddities } from './fixedChecks';
import { Names } from './name';
import { findStrays, findTwins, findUnusedDuties, findUnusedPeople, type Listing } from './nameChecks';
import { NearMisses } from './nearMiss';
import type { Range } from './range';
import { plainDuty, readDuties, type DutiesTable } from './readDuties';
import type { Reading } from './reading';
import { readCurrent, readPairs, type PairRows } from './readPairs';
import { readPeople, type PeopleTable } from './readPeople';
import { readRules, type Rule } from './readRules';
import { Report } from './report';

/** The tables as read, names numbered as they were met: listed ones first. */
interface Tables {
  readonly peopleTable: PeopleTable;
  readonly dutiesTable: DutiesTable;
  readonly pairRows: PairRows;
  readonly currentRows: PairRows | null;
  readonly rules: readonly Rule[];
  readonly duties: Names;
  readonly people: Names;
  readonly labels: Map<string, string>;
  /** Names of the duties that are in the case; those met later are not listed. */
  readonly dutyCount: number;
  /** Names in the people table. */
  readonly personCount: number;
  /** Names of people after the pairs were read, and then after the Fixed rules: those met later stand in `current` only. */
  readonly pairedCount: number;
  readonly namedCount: number;
}

/**
 * Reads the five ranges of a case: pairs, people, [duties], [rules], [current]. Never throws on
 * account of what they hold: faults and findings are collected in one pass over all tables.
 */
export function readCase(ranges: readonly (Range | null | undefined)[]): Reading {
  const report = new Report();
  const tables = readTables(ranges, report);
  const kase = makeCase(tables, report);
  const faults = report.faults();
  return {
    case: faults.length > 0 ? null : kase,
    faults,
    findings: report.findings(),
  };
}

function readTables([pairs, people, duties, rules, current]: readonly (Range | null | undefined)[], report: Report): Tables {
  const personNames = new Names();
  const dutyNames = new Names();
  const labels = new Map<string, string>();
  const peopleTable = readPeople(people ?? [], personNames, report);
  const personCount = personNames.count;
  const dutiesTable = readDuties(duties ?? null, dutyNames, labels, report);
  const listedDuties = dutyNames.count;
  const pairRows = readPairs(pairs ?? [], dutyNames, personNames, report);
  const dutyCount = dutiesTable.kind === 'table' ? listedDuties : dutyNames.count;
  const pairedCount = personNames.count;
  const ruleRows = readRules(rules ?? [], report);
  for (const rule of ruleRows) {
    if (rule.word !== 'Fixed') continue;
    const duty = dutyNames.find(rule.duty);
    if (duty !== -1 && duty < dutyCount) personNames.number(rule.person);
  }
  const namedCount = personNames.count;
  const isGiven = current !== null && current !== undefined;
  return {
    peopleTable,
    dutiesTable,
    pairRows,
    rules: ruleRows,
    currentRows: isGiven ? readCurrent(current, dutyNames, personNames, report) : null,
    duties: dutyNames,
    people: personNames,
    labels,
    dutyCount,
    personCount,
    pairedCount,
    namedCount,
  };
}

function makeCase(tables: Tables, report: Report): Case {
  const { peopleTable, dutiesTable, pairRows, currentRows, labels, dutyCount, personCount, namedCount } = tables;
  const duties = makeDirectory(tables.duties, dutyCount, []);
  const people = makeDirectory(tables.people, personCount, range(personCount, tables.people.count));
  findUnlisted(tables, report);
  const context = { duties, people, labels, doubleLabels: doubleLabels(dutiesTable) };
  const { rules, fixedRows } = caseRules(tables.rules, context, report);
  const { pairs, ranked } = casePairs(pairRows, duties, people, report);
  const kase: Case = {
    duties: makeDuties(dutiesTable, duties),
    people: makePeople(peopleTable, people, namedCount),
    dutyOrder: duties.order,
    personOrder: people.order,
    pairs,
    ranked,
    ...rules,
    current: currentRows === null ? null : caseSeats(currentRows, duties, people, report),
    labelNames: labels,
  };
  findFixedOddities(kase, fixedRows, report);
  findListedOddities(kase, tables, report);
  return kase;
}

/** Labels that some duties have as their slot and others, or the same, as their group. */
function doubleLabels(table: DutiesTable): Set<string> {
  const entries = table.kind === 'table' ? table.entries : [];
  const groups = new Set(entries.flatMap((entry) => [...entry.groups]));
  return new Set(entries.flatMap(({ slots }) => [...slots]).filter((slot) => groups.has(slot)));
}

function makeDuties(table: DutiesTable, { names, fromCase }: Directory): Duty[] {
  return Array.from(fromCase, (number): Duty => {
    const entry = table.kind === 'table' ? table.entries[number] : plainDuty(table.need);
    const { need, priority, load, slots, groups, times } = entry;
    return {
      name: names.names[number],
      key: names.keys[number],
      need,
      priority: Math.min(priority, LAST_PRIORITY),
      load,
      slots: [...slots].sort(),
      groups: [...groups].sort(),
      times: [...times].sort((a, b) => a.start - b.start || a.end - b.end),
    };
  });
}

/** @param named with one maximum for everyone, the people who have it: those named by pairs or Fixed rules */
function makePeople(table: PeopleTable, { names, fromCase }: Directory, named: number): Person[] {
  return Array.from(fromCase, (number): Person => {
    const label = { name: names.names[number], key: names.keys[number] };
    const plain = { ...label, minimum: 0, stretch: 1, carried: 0 };
    if (table.kind === 'everyone') {
      return number < named ? { ...plain, maximum: table.maximum, listed: true } : { ...plain, maximum: 0, listed: false };
    }
    if (number >= table.entries.length) return { ...plain, maximum: 0, listed: false };
    const { maximum, minimum, stretch, carried } = table.entries[number];
    return { ...label, maximum, minimum, stretch, carried, listed: true };
  });
}

/** Finds the names that pairs, Fixed rules and `current` use and that are not listed. */
function findUnlisted(tables: Tables, report: Report): void {
  const { peopleTable, dutiesTable, pairRows, currentRows, duties, people } = tables;
  const hasPeople = peopleTable.kind === 'table';
  const dutyListing: Listing = {
    kind: 'duty',
    names: duties,
    listed: tables.dutyCount,
    where: dutiesTable.kind === 'table' ? 'the duties table' : 'the pairs',
    effect: 'the row is left out',
  };
  const personListing: Listing = {
    kind: 'person',
    names: people,
    listed: hasPeople ? tables.personCount : tables.namedCount,
    where: hasPeople ? 'the people table' : 'the pairs',
    effect: 'the maximum is taken as 0',
  };
  findStrays('Pairs', pairRows, dutyListing, report);
  findStrays('Pairs', pairRows, personListing, report);
  if (hasPeople) findFixedStrays(tables, report);
  if (currentRows === null) return;
  findStrays('Current', currentRows, dutyListing, report);
  findStrays('Current', currentRows, { ...personListing, effect: 'the seat cannot be kept' }, report);
}

/** People who are named first by a Fixed rule: in no people table and in no pair. */
function findFixedStrays({ rules, people, personCount, pairedCount, namedCount }: Tables, report: Report): void {
  const near = new NearMisses(() => people.names.slice(0, personCount));
  let next = pairedCount;
  for (const rule of rules) {
    if (next === namedCount) return;
    if (rule.word !== 'Fixed' || people.find(rule.person) !== next) continue;
    const name = people.names[next++];
    const detail = `"${name}" is not in the people table; the Fixed seat is held all the same.${near.question(name)}`;
    report.find('Rules', rule.row, 'Person not listed', detail);
  }
}

/** Finds what is odd about the listed names: those no pair names, and those that are almost the same. */
function findListedOddities(kase: Case, { peopleTable, dutiesTable, labels }: Tables, report: Report): void {
  const personRow = rowIn(peopleTable);
  const dutyRow = rowIn(dutiesTable);
  const hasPeople = peopleTable.kind === 'table';
  findUnusedDuties(kase, dutyRow, report);
  if (hasPeople) findUnusedPeople(kase, personRow, report);
  const listed = kase.people.filter((person) => person.listed);
  findTwins(hasPeople ? 'People' : 'Pairs', 'people', listed, personRow, report);
  findTwins(dutiesTable.kind === 'table' ? 'Duties' : 'Pairs', 'duties', kase.duties, dutyRow, report);
  const slots = Array.from(labels, ([key, name]) => ({ key, name }));
  findTwins('Duties', 'slots or groups', slots, () => null, report);
}

/** The row that lists each name; null where there is no table. */
function rowIn(table: PeopleTable | DutiesTable): (number: number) => number | null {
  return table.kind === 'table' ? (number) => table.entries[number].row : () => null;
}

function range(from: number, to: number): number[] {
  return Array.from({ length: Math.max(0, to - from) }, (_, i) => from + i);
}
