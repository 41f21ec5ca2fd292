import { describe, expect, it } from 'vitest';
import { registerBulk } from '../../../src/host/workbench/bulk';
import { EngineTables } from '../../../src/host/workbench/tables';
import type { Book } from '../../../src/workbench/files/book';
import { formatTable } from '../../../src/workbench/files/formats';
import { fromEngine } from '../../../src/workbench/files/fromEngine';
import { openXlsx } from '../../../src/workbench/files/openXlsx';
import { saveXlsx } from '../../../src/workbench/files/saveXlsx';
import { toEngineData } from '../../../src/workbench/files/toEngine';
import type { EngineModel } from '../../../src/host/workbench/engine';
import { engine } from '../../helpers/engine';
import { unzip, xlsx, type HandWritten } from '../../helpers/zip';

registerBulk(engine);

/** A file after it was opened, changed and saved: the XML of its first sheet, its workbook and its styles. */
async function saved(file: Partial<HandWritten>, change: (model: EngineModel) => void = () => undefined) {
  const book = await openXlsx(xlsx({ sheets: { S: CELLS, Lists: LISTS }, ...file }));
  const model = new engine.Model(toEngineData(book, engine));
  change(model);
  const bytes = await saveXlsx(fromEngine(model, formatTable(book, engine).toFile, book));
  const parts = unzip(bytes);
  const part = (path: string): string => parts[path] ?? '';
  return { book, bytes, model, sheet: part('xl/worksheets/sheet1.xml'), workbook: part('xl/workbook.xml'), styles: part('xl/styles.xml') };
}

const number = (place: string, value: number) => `<c r="${place}"><v>${value}</v></c>`;
const text = (place: string, value: string, style = 0) => `<c r="${place}" s="${style}" t="inlineStr"><is><t>${value}</t></is></c>`;
const CELLS = `<row r="1">${number('A1', 1)}${number('B1', 2)}</row><row r="2">${number('A2', 3)}</row><row r="3">${number('A3', 3)}</row>`;
const LISTS = `<row r="1">${text('A1', 'yes')}</row><row r="2">${text('A2', 'no')}</row>`;

/** Elements of a name with their attributes in order, as the saved file has them. */
function elements(xml: string, tag: string): string[] {
  return [...xml.matchAll(new RegExp(`<${tag}\\b[^>]*?(?:/>|>.*?</${tag}>)`, 'gsu'))].map(([whole]) => whole);
}

function insertRow(model: EngineModel): void {
  model.dispatch('ADD_COLUMNS_ROWS', { sheetId: 'sheet1', sheetName: 'S', dimension: 'ROW', base: 0, position: 'before', quantity: 1 });
}

describe('input checks of a file', () => {
  const checks = {
    'a whole number': '<dataValidation type="whole" sqref="A1:A9" operator="greaterThanOrEqual" allowBlank="1" showErrorMessage="1" errorTitle="No" error="At least 0"><formula1>0</formula1></dataValidation>',
    'a number between two cells': '<dataValidation type="decimal" sqref="B1:B9" operator="between" allowBlank="1" errorStyle="warning"><formula1>$A$1</formula1><formula2>$A$2+1</formula2></dataValidation>',
    'a typed list': '<dataValidation type="list" sqref="C1 E1:E4" showInputMessage="1" promptTitle="Which" prompt="One of them"><formula1>"yes,no"</formula1></dataValidation>',
    'a list in a range': '<dataValidation type="list" sqref="D1:D9"><formula1>Lists!$A$1:$A$2</formula1></dataValidation>',
    'a list by name': '<dataValidation type="list" sqref="F1:F9"><formula1>Answers</formula1></dataValidation>',
    'a list by formula': '<dataValidation type="list" sqref="G1:G9"><formula1>INDIRECT(&quot;Lists!A1:A2&quot;)</formula1></dataValidation>',
    'a date': '<dataValidation type="date" sqref="H1:H9" operator="greaterThan"><formula1>46000</formula1></dataValidation>',
    'no such date': '<dataValidation type="date" sqref="I1:I9" operator="notEqual"><formula1>46000</formula1></dataValidation>',
    'a time': '<dataValidation type="time" sqref="J1:J9" operator="lessThan"><formula1>0.5</formula1></dataValidation>',
    'the length of a text': '<dataValidation type="textLength" sqref="K1:K9" operator="lessThanOrEqual"><formula1>12</formula1></dataValidation>',
    'a formula': '<dataValidation type="custom" sqref="L1:L9"><formula1>COUNTIF($L$1:$L$9,L1)=1</formula1></dataValidation>',
    'a formula unknown here': '<dataValidation type="custom" sqref="M1:M9"><formula1>_xlfn.LET(_xlpm.x,M1,_xlpm.x&gt;1)</formula1></dataValidation>',
  };

  it.each(Object.entries(checks))('are kept: %s', async (_, check) => {
    const { sheet, book } = await saved({
      after: `<dataValidations count="1">${check}</dataValidations>`,
      names: '<definedName name="Answers">Lists!$A$1:$A$2</definedName>',
    });
    const [kept] = elements(sheet, 'dataValidation');
    const parsed = (xml: string) => [...xml.matchAll(/[\w]+="[^"]*"|<formula\d>[^<]*/gu)].map(([part]) => part.replaceAll('&quot;', '"')).sort();
    expect(parsed(kept)).toEqual(parsed(check));
    expect(book.lost).toEqual([]);
  });

  it('hold in the engine too: what may be typed, and what is offered', async () => {
    const { model } = await saved({
      after: `<dataValidations count="12">${Object.values(checks).join('')}</dataValidations>`,
      names: '<definedName name="Answers">Lists!$A$1:$A$2</definedName>',
    });
    const { getters } = model as unknown as {
      getters: { getValidationResultForCellValue(value: unknown, at: object): { isValid: boolean }; cellHasListDataValidationIcon(at: object): boolean };
    };
    const at = (col: number, row = 0) => ({ sheetId: 'sheet1', col, row });
    const allowed = (col: number, value: unknown, row = 0) => getters.getValidationResultForCellValue(value, at(col, row)).isValid;
    expect([allowed(0, 0), allowed(0, -1)]).toEqual([true, false]);
    expect([allowed(1, 4), allowed(1, 5), allowed(1, 0)]).toEqual([true, false, false]);
    expect([allowed(2, 'yes'), allowed(4, 'no', 3), allowed(4, 'perhaps', 3)]).toEqual([true, true, false]);
    for (const column of [3, 5]) expect([allowed(column, 'no'), allowed(column, 'perhaps')]).toEqual([true, false]);
    expect([allowed(7, 46001), allowed(7, 46000)]).toEqual([true, false]);
    expect([allowed(9, 0.25), allowed(9, 0.75)]).toEqual([true, false]);
    // What the engine cannot check it lets pass rather than mark it as wrong.
    for (const column of [6, 8, 10, 12]) expect(allowed(column, 'anything')).toBe(true);
    expect([2, 3, 4, 5].map((column) => getters.cellHasListDataValidationIcon(at(column)))).toEqual([true, true, true, true]);
  });

  it('hold where a program has left a second number that is not needed', async () => {
    const check = checks['a whole number'].replace('</formula1>', '</formula1><formula2>0</formula2>');
    const { model } = await saved({ after: `<dataValidations>${check}</dataValidations>` });
    expect(model.exportData().sheets[0].dataValidationRules?.[0].criterion).toEqual({ type: 'isGreaterOrEqualTo', values: ['0'] });
  });

  it('for whole columns and rows cost the engine only the cells there are, and keep their ranges', async () => {
    const ranges = ['A1:A1048576', 'C2:D1048576', 'A5:XFD6', 'F2:XFD3'];
    const rules = ranges.map((range) => `<dataValidation type="whole" sqref="${range}" operator="lessThan"><formula1>9</formula1></dataValidation>`);
    const { sheet, model } = await saved({ after: `<dataValidations>${rules.join('')}</dataValidations>` }, insertRow);
    const { getters } = model as unknown as { getters: { isDataValidationInvalid(at: object): boolean } };
    const before = performance.now();
    expect(getters.isDataValidationInvalid({ sheetId: 'sheet1', col: 0, row: 1 })).toBe(false);
    expect(performance.now() - before).toBeLessThan(1_000);
    expect(elements(sheet, 'dataValidation').map((xml) => /sqref="([^"]*)"/u.exec(xml)![1])).toEqual(['A2:A1048576', 'C3:D1048576', 'A6:XFD7', 'F3:XFD4']);
  });

  it('of a sheet that the product adds are in the saved file', async () => {
    const draft = { name: 'Need', rows: [['Duty', 'Need'], ['Choir', 2]], wholes: [{ column: 1, from: 1, least: 0 }] };
    const { bytes } = await saved({}, (model) => new EngineTables(model, engine).addSheets([draft]));
    const check = elements(unzip(bytes)['xl/worksheets/sheet3.xml'], 'dataValidation');
    expect(check).toHaveLength(1);
    expect(check[0]).toMatch(/type="whole" sqref="B2:B\d+" operator="greaterThanOrEqual" allowBlank="1" showErrorMessage="1" errorStyle="warning"/u);
    expect(check[0]).toContain('<formula1>0</formula1>');
  });

  it('follow when rows are inserted above them', async () => {
    const { sheet } = await saved({ after: `<dataValidations>${checks['a whole number']}${checks['a number between two cells']}${checks['a formula']}</dataValidations>` }, insertRow);
    expect(elements(sheet, 'dataValidation').map((xml) => /sqref="([^"]*)"/u.exec(xml)![1])).toEqual(['A2:A10', 'B2:B10', 'L2:L10']);
    expect(sheet).toContain('<formula1>$A$2</formula1><formula2>$A$3+1</formula2>');
    expect(sheet).toContain('<formula1>COUNTIF($L$2:$L$10,L2)=1</formula1>');
  });
});

describe('conditional formats of a file', () => {
  const styles =
    '<fonts><font><sz val="11"/><name val="Calibri"/></font></fonts>' +
    '<dxfs><dxf><font><b/><color rgb="FF9C0006"/></font><fill><patternFill><bgColor rgb="FFFFC7CE"/></patternFill></fill></dxf></dxfs>';
  const formats = {
    'a comparison': '<cfRule type="cellIs" dxfId="0" priority="2" operator="greaterThan"><formula>$B$1</formula></cfRule>',
    'a formula': '<cfRule type="expression" dxfId="0" priority="2" stopIfTrue="1"><formula>A1=$B$1+1</formula></cfRule>',
    'the beginning of a text': '<cfRule type="beginsWith" dxfId="0" priority="2" operator="beginsWith" text="un"><formula>LEFT(A1,2)="un"</formula></cfRule>',
    'what there is twice': '<cfRule type="duplicateValues" dxfId="0" priority="2"/>',
    'blank cells': '<cfRule type="containsBlanks" dxfId="0" priority="2"><formula>LEN(TRIM(A1))=0</formula></cfRule>',
    'a scale of colours': '<cfRule type="colorScale" priority="2"><colorScale><cfvo type="min"/><cfvo type="percentile" val="50"/><cfvo type="max"/><color rgb="FFF8696B"/><color rgb="FFFFEB84"/><color rgb="FF63BE7B"/></colorScale></cfRule>',
    bars: '<cfRule type="dataBar" priority="2"><dataBar><cfvo type="min"/><cfvo type="max"/><color rgb="FF638EC6"/></dataBar></cfRule>',
    signs: '<cfRule type="iconSet" priority="2"><iconSet iconSet="5Arrows"><cfvo type="percent" val="0"/><cfvo type="percent" val="20"/><cfvo type="percent" val="40"/><cfvo type="percent" val="60"/><cfvo type="percent" val="80"/></iconSet></cfRule>',
  };

  it.each(Object.entries(formats))('are kept: %s', async (_, rule) => {
    const { sheet, book, styles: kept, bytes } = await saved({ styles, after: `<conditionalFormatting sqref="A1:A3">${rule}</conditionalFormatting>` });
    const [format] = elements(sheet, 'conditionalFormatting');
    const parsed = (xml: string) => [...xml.matchAll(/(?!priority)\b\w+="[^"]*"|<formula>[^<]*/gu)].map(([part]) => part.replace('"true"', '"1"'));
    // Of the comparison by text the file library passes over the operator, which only repeats the type.
    const expected = parsed(`sqref="A1:A3" ${rule.replace(' operator="beginsWith"', '')}`);
    expect(parsed(format.replaceAll('&quot;', '"')).sort()).toEqual(expected.sort());
    expect(book.lost).toEqual([]);
    if (rule.includes('dxfId')) expect(elements(kept, 'dxf')[0]).toMatch(/<b\/>.*FF9C0006.*FFFFC7CE/su);
    expect((await openXlsx(bytes)).sheets[0].conditions).toEqual(book.sheets[0].conditions);
  });

  it('are drawn by the engine and follow when rows are inserted', async () => {
    const { model, sheet } = await saved({ styles, after: `<conditionalFormatting sqref="A1:A3">${formats['a formula']}</conditionalFormatting>` }, insertRow);
    const { getters } = model as unknown as { getters: { getCellConditionalFormatStyle(at: object): { fillColor?: string } | undefined } };
    const fill = (row: number) => getters.getCellConditionalFormatStyle({ sheetId: 'sheet1', col: 0, row })?.fillColor?.toLowerCase();
    expect([1, 2, 3].map(fill)).toEqual([undefined, '#ffc7ce', '#ffc7ce']);
    expect(sheet).toContain('<conditionalFormatting sqref="A2:A4">');
    expect(sheet).toContain('<formula>A2=$B$2+1</formula>');
  });

  it('that the file library does not read whole are named before saving', async () => {
    for (const rule of ['<cfRule type="top10" dxfId="0" priority="1" rank="3"/>', '<cfRule type="timePeriod" dxfId="0" priority="1" timePeriod="today"><formula>TRUE</formula></cfRule>']) {
      const { book } = await saved({ styles, after: `<conditionalFormatting sqref="A1:A3">${rule}</conditionalFormatting>` });
      expect(book.lost).toEqual(['some conditional formats']);
    }
    const apart = '<extLst><ext><x14:dataValidations><x14:dataValidation type="list"/></x14:dataValidations></ext></extLst>';
    expect((await saved({ after: apart })).book.lost).toEqual(['some input checks (data validation)']);
  });
});

describe('fonts and places in the text', () => {
  const styles =
    '<fonts><font><sz val="10"/><name val="Arial"/></font><font><sz val="16"/><u val="double"/><name val="Georgia"/></font><font><sz val="10"/><vertAlign val="superscript"/><name val="Arial"/></font></fonts>' +
    '<fills><fill/></fills><borders><border/></borders>' +
    '<cellXfs><xf/><xf fontId="1" applyFont="1" applyAlignment="1"><alignment horizontal="justify" textRotation="45"/></xf>' +
    '<xf fontId="2" applyFont="1" applyAlignment="1"><alignment indent="2" shrinkToFit="1" textRotation="255"/></xf><xf applyAlignment="1"><alignment textRotation="135"/></xf></cellXfs>';

  it('are kept, the usual font of the file too', async () => {
    const sheets = { S: `<row r="1">${text('A1', 'a', 1)}${text('B1', 'b', 2)}${text('C1', 'c', 3)}${text('D1', 'd')}</row>` };
    const { book, bytes, styles: kept } = await saved({ sheets, styles });
    expect(book.lost).toEqual([]);
    expect(book.font).toEqual({ name: 'Arial', size: 10 });
    expect(elements(kept, 'font')[0]).toMatch(/<sz val="10"\/><name val="Arial"\/>/u);
    expect(kept).toMatch(/<u val="double"\/>.*Georgia/su);
    const looks = (read: Book) => read.sheets[0].cells.map(({ style }) => style);
    expect(looks(book)).toEqual([
      { underline: true, size: 16, rotation: 45, unseen: { font: 'Georgia', underline: 'double', horizontal: 'justify' } },
      { unseen: { script: 'superscript', indent: 2, shrink: true, upright: true } },
      { rotation: 135 },
      null,
    ]);
    expect(looks(await openXlsx(bytes))).toEqual(looks(book));
  });

  it('stay with a cell that is made bold', async () => {
    const sheets = { S: `<row r="1">${text('A1', 'a', 1)}</row>` };
    const { bytes } = await saved({ sheets, styles }, (model) => {
      const target = [{ top: 0, bottom: 0, left: 0, right: 0 }];
      model.dispatch('SET_FORMATTING', { sheetId: 'sheet1', target, style: { bold: true } });
    });
    expect((await openXlsx(bytes)).sheets[0].cells[0].style).toMatchObject({ bold: true, unseen: { font: 'Georgia' } });
  });
});

describe('what a file has beyond that', () => {
  it('is named before saving: lines the engine draws plainer, page breaks, groups, print areas', async () => {
    const border = (line: string) => `<borders><border/><border>${line}</border></borders><cellXfs><xf/><xf borderId="1" applyBorder="1"/></cellXfs>`;
    const sheets = { S: `<row r="1">${text('A1', 'a', 1)}</row>` };
    for (const line of ['<bottom style="double"/>', '<top style="dashDot"/>', '<diagonal style="thin"/>']) {
      expect((await saved({ sheets, styles: border(line) })).book.lost).toEqual(['fine kinds of borders (double, dash-dot and diagonal lines)']);
    }
    expect((await saved({ sheets, styles: border('<bottom style="medium"/>') })).book.lost).toEqual([]);
    expect((await saved({ after: '<rowBreaks><brk id="3"/></rowBreaks>' })).book.lost).toEqual(['page breaks']);
    expect((await saved({ sheets: { S: `<row r="1" outlineLevel="1">${text('A1', 'a')}</row>` } })).book.lost).toEqual(['grouped rows and columns']);
    const whole = `<row r="1" s="1" customFormat="1">${text('A1', 'a')}</row>`;
    expect((await saved({ sheets: { S: whole } })).book.lost).toEqual(['the look of blank cells that whole columns or rows have']);
    const names = '<definedName name="_xlnm.Print_Area" localSheetId="0">S!$A$1:$B$2</definedName>';
    expect((await saved({ names })).book.lost).toEqual(['print areas and repeated headings']);
  });
});

describe('the sheet in view and how sheets are printed', () => {
  it('are kept', async () => {
    const after =
      '<pageMargins left="0.5" right="0.5" top="1" bottom="1" header="0.3" footer="0.3"/><pageSetup paperSize="9" orientation="landscape"/>' +
      '<headerFooter><oddHeader>Plan</oddHeader></headerFooter>';
    const { book, bytes, workbook, sheet } = await saved({ after }, (model) => {
      model.dispatch('ACTIVATE_SHEET', { sheetIdFrom: 'sheet1', sheetIdTo: 'sheet2' });
    });
    expect(book.active).toBe(0);
    expect(workbook).toContain('activeTab="1"');
    expect((await openXlsx(bytes)).active).toBe(1);
    expect(sheet).toContain('<oddHeader>Plan</oddHeader>');
    expect(sheet).toMatch(/<pageSetup [^>]*orientation="landscape"/u);
    expect(book.lost).toEqual([]);
  });
});
