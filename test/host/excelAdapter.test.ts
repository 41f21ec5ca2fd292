import { formatAddress, formatZone } from '../../src/host/address';
import { ExcelWorkbook } from '../../src/host/excel/workbook';
import { FakeExcel, typeInto } from '../helpers/fakeExcel';
import { describeWorkbookPort } from './contract';

describeWorkbookPort('Excel', () => {
  const excel = new FakeExcel();
  excel.install();
  return {
    port: new ExcelWorkbook(),
    write: (address, formula) => typeInto(excel, address, formula),
    selected: () => formatAddress({ sheet: excel.selected.sheet, cell: formatZone(excel.selected.zone) }),
  };
});
