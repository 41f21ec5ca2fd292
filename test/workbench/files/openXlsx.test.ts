import { describe, expect, it } from 'vitest';
import type { Book } from '../../../src/workbench/files/book';
import { openXlsx } from '../../../src/workbench/files/openXlsx';
import { xlsx } from '../../helpers/zip';

const OFFICE = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';

/** What stands in the cells of a sheet, formulas before values. */
function shown({ sheets }: Book, sheet = 0) {
  return Object.fromEntries(
    sheets[sheet].cells.map(({ row, column, formula, value }) => [`${'ABCDEFGH'[column]}${row + 1}`, formula ?? value]),
  );
}

const text = (place: string, value: string) => `<c r="${place}" t="inlineStr"><is><t>${value}</t></is></c>`;

describe('formulas of a file', () => {
  it('that were filled down are written out in every cell', async () => {
    const book = await openXlsx(
      xlsx({
        sheets: {
          S: `<row r="1"><c r="A1"><f t="shared" ref="A1:B3" si="0">C1+$C$1+C$2+$C3+"A1"+SUM(D:D,'A1'!E1)+LOG10(C1)</f><v>1</v></c><c r="B1"><f t="shared" si="0"/><v>1</v></c></row>
              <row r="3"><c r="A3"><f t="shared" si="0"/><v>3</v></c></row>`,
        },
      }),
    );
    expect(shown(book)).toEqual({
      A1: `=C1+$C$1+C$2+$C3+"A1"+SUM(D:D,'A1'!E1)+LOG10(C1)`,
      B1: `=D1+$C$1+D$2+$C3+"A1"+SUM(E:E,'A1'!F1)+LOG10(D1)`,
      A3: `=C3+$C$1+C$2+$C5+"A1"+SUM(D:D,'A1'!E3)+LOG10(C3)`,
    });
  });

  it('say #REF! where filling down led out of the sheet', async () => {
    const book = await openXlsx(
      xlsx({
        sheets: {
          S: '<row r="1"><c r="A1"><f t="shared" si="3"/><v>1</v></c></row><row r="2"><c r="A2"><f t="shared" ref="A1:A2" si="3">B1</f><v>1</v></c></row>',
        },
      }),
    );
    expect(shown(book)).toEqual({ A1: '=#REF!', A2: '=B1' });
  });

  it('with references by table and column get the ranges they stand for', async () => {
    const formula = (place: string, code: string) => `<c r="${place}"><f>${code}</f><v>0</v></c>`;
    const book = await openXlsx(
      xlsx({
        sheets: {
          'Who may': `<row r="2">${text('B2', 'Duty')}${text('C2', "Person's name")}</row>
            <row r="3">${text('B3', 'Choir')}${text('C3', 'Ann')}${formula('E3', 'PairList[[#This Row],[Duty]]')}${formula('F3', 'PairList[@Duty]')}</row>
            <row r="4">${text('B4', 'Organ')}${text('C4', 'Bob')}${formula('E4', '_xldudf_DUTY_ASSIGN(PairList[#All],3)')}${formula('F4', 'COUNTA(pairlist)')}</row>
            <row r="5">${formula('E5', 'COUNTA(PairList[Duty])')}${formula('F5', "COUNTA(PairList[[#All],[Duty]:[Person''s name]])")}</row>
            <row r="6">${formula('E6', 'PairList[#Headers]')}${formula('F6', '"PairList[Duty]"')}${formula('G6', 'COUNTA(PairList[Gone])')}</row>`,
        },
        after: '<tableParts count="1"><tablePart r:id="t1"/></tableParts>',
        relations: `<Relationship Id="t1" Type="${OFFICE}/table" Target="../tables/table1.xml"/>`,
        parts: {
          'xl/tables/table1.xml':
            '<table xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main" id="1" name="PairList" displayName="PairList" ref="B2:C4"><autoFilter ref="B2:C4"/>' +
            '<tableColumns count="2"><tableColumn id="1" name="Duty"/><tableColumn id="2" name="Person\'s name"/></tableColumns></table>',
        },
      }),
    );
    const cells = shown(book);
    expect(cells).toMatchObject({
      E3: "='Who may'!$B$3",
      F3: "='Who may'!$B$3",
      E4: "=DUTY.ASSIGN('Who may'!$B$2:$C$4,3)",
      F4: "=COUNTA('Who may'!$B$3:$C$4)",
      E5: "=COUNTA('Who may'!$B$3:$B$4)",
      F5: "=COUNTA('Who may'!$B$2:$C$4)",
      E6: "='Who may'!$B$2:$C$2",
      F6: '="PairList[Duty]"',
      G6: '=COUNTA(PairList[Gone])',
    });
    expect(book.names).toEqual([{ name: 'PairList', reference: "'Who may'!B2:C4" }]);
    expect(book.lost).toContain('tables as such (their ranges stay, under their names)');
  });
});

describe('names of a file', () => {
  it('are named ranges where they stand for one range, and are kept aside otherwise', async () => {
    const book = await openXlsx(
      xlsx({
        sheets: { S: text('A1', 'x') },
        names:
          "<definedName name=\"Pairs\">S!$A$1:$B$9</definedName><definedName name=\"Column\">'S'!$A:$A</definedName>" +
          '<definedName name="Rate">0.2</definedName><definedName name="Two">S!$A$1,S!$B$1</definedName>' +
          '<definedName name="Local" localSheetId="0">S!$A$1</definedName><definedName name="Gone">#REF!</definedName>',
      }),
    );
    expect(book.names).toEqual([
      { name: 'Pairs', reference: 'S!A1:B9' },
      { name: 'Column', reference: "'S'!A:A" },
    ]);
    expect(book.otherNames).toEqual([
      { name: 'Rate', content: '0.2' },
      { name: 'Two', content: 'S!$A$1,S!$B$1' },
      { name: 'Local', content: 'S!$A$1', sheet: 'S' },
      { name: 'Gone', content: '#REF!' },
    ]);
  });
});

describe('values and looks of a file', () => {
  it('are read with their colours, lines, formats and dates', async () => {
    const book = await openXlsx(
      xlsx({
        sheets: {
          S: '<row r="1" ht="30" customHeight="1"><c r="A1" s="1"><v>45000.375</v></c><c r="B1" t="e"><v>#N/A</v></c><c r="C1" s="2"><v>1</v></c></row>',
        },
        styles:
          '<fonts><font><sz val="11"/></font><font><b/><sz val="14"/><color theme="4"/></font></fonts>' +
          '<fills><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill><fill><patternFill patternType="solid"><fgColor theme="4" tint="0.5"/></patternFill></fill></fills>' +
          '<borders><border/><border><left/><right/><top/><bottom style="double"><color indexed="10"/></bottom></border></borders>' +
          '<cellXfs><xf/><xf numFmtId="22" applyNumberFormat="1"/><xf fontId="1" fillId="2" borderId="1" applyFont="1" applyFill="1" applyBorder="1"/></cellXfs>',
        parts: {
          'xl/theme/theme1.xml':
            '<a:theme xmlns:a="http://schemas.openxmlformats.org/drawingml/2006/main"><a:themeElements><a:clrScheme name="x">' +
            ['dk1', 'lt1', 'dk2', 'lt2', 'accent1', 'accent2', 'accent3', 'accent4', 'accent5', 'accent6', 'hlink', 'folHlink']
              .map((name) => `<a:${name}><a:srgbClr val="${name === 'accent1' ? '204060' : '000000'}"/></a:${name}>`)
              .join('') +
            '</a:clrScheme></a:themeElements></a:theme>',
        },
      }),
    );
    const [date, error, styled] = book.sheets[0].cells;
    expect(date).toMatchObject({ value: 45000.375, format: 'm/d/yyyy h:mm' });
    expect(error).toMatchObject({ value: '#N/A', isError: true });
    expect(styled.style).toEqual({
      bold: true,
      size: 14,
      colour: '#204060',
      fill: '#90a0b0',
      border: { bottom: { style: 'thick', colour: '#ff0000' } },
    });
    expect(book.sheets[0].heights?.get(0)).toBe(40);
  });
});

describe('what cannot be kept', () => {
  it('is said in words', async () => {
    const part = '<x/>';
    const book = await openXlsx(
      xlsx({
        sheets: { S: text('A1', 'x') },
        after: '<sheetProtection sheet="1"/><conditionalFormatting sqref="A1"><cfRule type="top10" priority="1" rank="3"/></conditionalFormatting>',
        parts: { 'xl/vbaProject.bin': part, 'xl/charts/chart1.xml': part, 'xl/media/image1.png': part, 'xl/comments1.xml': part },
      }),
    );
    expect(book.lost).toEqual(['macros', 'charts', 'pictures', 'comments and notes', 'sheet protection', 'some conditional formats']);
  });

  it('is nothing for a plain file', async () => {
    expect((await openXlsx(xlsx({ sheets: { S: text('A1', 'x') } }))).lost).toEqual([]);
  });

  it('includes the whole file where it is no workbook', async () => {
    await expect(openXlsx(new TextEncoder().encode('no workbook'))).rejects.toThrow('This file cannot be read as an .xlsx workbook');
    await expect(openXlsx(new Uint8Array())).rejects.toThrow('This file cannot be read as an .xlsx workbook');
  });
});
