/** Imports point inwards only: flow <- cover <- sheet <- functions (and exact beside them, by its answers only) <- host, pane <- workbench <- entries. */
const rooms = [
  ['flow', [], 'flow/ holds integers and typed arrays; it knows no names, no cells and no other room.'],
  ['cover', ['flow'], 'cover/ holds the staffing question; it may use flow/ only, never cells or hosts.'],
  ['exact', ['flow', 'cover'], 'exact/ searches cases that are no flow; it may use cover/ and flow/, never cells or hosts.'],
  ['sheet', ['cover'], 'sheet/ reads and writes cells; it may know the case of cover/, nothing further out.'],
  ['functions', ['flow', 'cover', 'sheet', 'exact'], 'functions/ may use the rooms inside it, never a host or the pane.'],
  ['host', ['functions', 'sheet', 'cover', 'exact'], 'host/ adapts workbooks to the functions; it must not know the pane or a page.'],
  ['desk', ['functions', 'sheet', 'cover', 'exact', 'host'], 'desk/ turns cases into sheets and tables into cases; it knows the port, no page.'],
  ['pane', ['desk', 'functions', 'sheet', 'cover', 'exact', 'host'], 'pane/ shows what the functions answered, through the port.'],
  ['workbench', ['functions', 'sheet', 'host', 'desk'], 'workbench/ is the page around the sheet engine; the pane is put in by its entry.'],
];

module.exports = {
  forbidden: [
    ...rooms.map(([room, allowed, comment]) => ({
      name: `${room}-points-inwards`,
      comment,
      severity: 'error',
      from: { path: `^src/${room}/` },
      to: { path: '^src/', pathNot: [room, ...allowed].map((name) => `^src/${name}/`) },
    })),
    {
      name: 'only-entries-choose-a-host',
      comment: 'The pane sees workbooks through host/port.ts and addresses through host/address.ts, never an adapter.',
      severity: 'error',
      from: { path: '^src/(pane|desk)/' },
      to: { path: '^src/host/', pathNot: '^src/host/(port|address|regions)[.]ts$' },
    },
    {
      name: 'no-engine-in-excel',
      comment: 'The bundle that Excel loads must not reach the sheet engine or the file library.',
      severity: 'error',
      from: { path: '^src/entries/excel[.]ts$' },
      to: { path: '(@odoo|hucre|papaparse|src/workbench|src/host/workbench)', reachable: true },
    },
    {
      name: 'search-stays-in-its-worker',
      comment: 'Only the worker may reach the search and its solver; the rest knows its answers, as types.',
      severity: 'error',
      from: { path: '^src/', pathNot: '^src/(exact/|entries/search[.]ts$)' },
      to: { path: '^src/exact/', pathNot: '^src/exact/answers[.]ts$' },
    },
    { name: 'no-cycles', comment: 'A circle of imports has no inside.', severity: 'error', from: {}, to: { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } } },
  ],
  options: { tsConfig: { fileName: 'tsconfig.json' }, tsPreCompilationDeps: true, doNotFollow: { path: 'node_modules' } },
};
