import { LAST_PRIORITY, type Case, type Duty, type Person } from '../cover/case';
import { casePairs, caseSeats } from './casePairs';
import { caseRules } from './caseRules';
import { makeDirectory, type Directory } from './directory';
import { findFixedOddities } from './fixedChecks';
import { Names } from './name';
import { findStrays, findTwins, findUnusedDuties, findUnusedPeople } from './nameChecks';
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
  return { case: faults.length > 0 ? null : kase, faults, findings: report.findings() };
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
  const isGiven = current !== null && current !== undefined;
  return {
    peopleTable,
    dutiesTable,
    pairRows,
    rules: rules === null || rules === undefined ? [] : readRules(rules, report),
    currentRows: isGiven ? readCurrent(current, dutyNames, personNames, report) : null,
    duties: dutyNames,
    people: personNames,
    labels,
    dutyCount,
    personCount,
  };
}

function makeCase(tables: Tables, report: Report): Case {
  const { peopleTable, dutiesTable, pairRows, currentRows, labels, dutyCount, personCount } = tables;
  for (const rule of tables.rules) if (rule.word === 'Fixed') tables.people.number(rule.person);
  const duties = makeDirectory(tables.duties, dutyCount, []);
  const people = makeDirectory(tables.people, personCount, range(personCount, tables.people.count));
  if (dutiesTable.kind === 'table') findStrays('Pairs', 'duty', pairRows, duties, dutyCount, report);
  if (peopleTable.kind === 'table') findStrays('Pairs', 'person', pairRows, people, personCount, report);
  if (currentRows !== null) {
    findStrays('Current', 'duty', currentRows, duties, dutyCount, report);
    if (peopleTable.kind === 'table') findStrays('Current', 'person', currentRows, people, personCount, report);
  }

  const rules = caseRules(tables.rules, { duties, people, labels }, report);
  const { pairs, ranked } = casePairs(pairRows, duties, people, report);
  const kase: Case = {
    duties: makeDuties(dutiesTable, duties),
    people: makePeople(peopleTable, people),
    dutyOrder: duties.order,
    personOrder: people.order,
    pairs,
    ranked,
    ...rules,
    current: currentRows === null ? null : caseSeats(currentRows, duties, people, report),
    labelNames: labels,
  };
  findOddities(kase, tables, report);
  return kase;
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

function makePeople(table: PeopleTable, { names, fromCase }: Directory): Person[] {
  return Array.from(fromCase, (number): Person => {
    const label = { name: names.names[number], key: names.keys[number] };
    if (table.kind === 'everyone') {
      return { ...label, maximum: table.maximum, minimum: 0, stretch: 1, carried: 0, listed: true };
    }
    const entry = table.entries.at(number);
    if (number >= table.entries.length || entry === undefined) {
      return { ...label, maximum: 0, minimum: 0, stretch: 1, carried: 0, listed: false };
    }
    const { maximum, minimum, stretch, carried } = entry;
    return { ...label, maximum, minimum, stretch, carried, listed: true };
  });
}

function findOddities(kase: Case, tables: Tables, report: Report): void {
  for (const { name, listed } of kase.people) {
    const rule = listed ? undefined : fixedRuleOf(tables, name);
    if (rule !== undefined) {
      report.find('Rules', rule.row, 'Person not listed', `"${name}" is not in the people table; the Fixed seat is held all the same.`);
    }
  }
  findFixedOddities(kase, report);
  findUnusedDuties(kase, report);
  if (tables.peopleTable.kind === 'table') findUnusedPeople(kase, report);
  const keysOf = (entries: readonly { key: string }[]): string[] => entries.map(({ key }) => key);
  const namesOf = (entries: readonly { name: string }[]): string[] => entries.map(({ name }) => name);
  const listed = kase.people.filter((person) => person.listed);
  findTwins('People', 'people', namesOf(listed), keysOf(listed), report);
  findTwins('Duties', 'duties', namesOf(kase.duties), keysOf(kase.duties), report);
  findTwins('Duties', 'slots or groups', [...tables.labels.values()], [...tables.labels.keys()], report);
}

/** A Fixed rule is the only place that names this person. */
function fixedRuleOf({ rules, people, pairRows }: Tables, name: string): Rule | undefined {
  const number = people.find(name);
  if (pairRows.person.subarray(0, pairRows.count).includes(number)) return undefined;
  return rules.find((rule) => rule.word === 'Fixed' && people.find(rule.person) === number);
}

function range(from: number, to: number): number[] {
  return Array.from({ length: Math.max(0, to - from) }, (_, i) => from + i);
}
