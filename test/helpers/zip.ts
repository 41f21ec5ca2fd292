import { crc32, inflateRawSync } from 'node:zlib';

/** A zip file of texts by their paths, nothing compressed: enough to write parts of a workbook by hand. */
function zip(files: Readonly<Record<string, string>>): Uint8Array {
  const bodies: Buffer[] = [];
  const directory: Buffer[] = [];
  let offset = 0;
  for (const [path, text] of Object.entries(files)) {
    const name = Buffer.from(path);
    const body = Buffer.from(text);
    const common = Buffer.alloc(26);
    common.writeUInt16LE(20, 0);
    common.writeUInt32LE(crc32(body), 10);
    common.writeUInt32LE(body.length, 14);
    common.writeUInt32LE(body.length, 18);
    common.writeUInt16LE(name.length, 22);
    bodies.push(Buffer.from('PK\u0003\u0004', 'latin1'), common, name, body);
    const entry = Buffer.alloc(14);
    entry.writeUInt32LE(offset, 10);
    directory.push(Buffer.from('PK\u0001\u0002\u0014\u0000', 'latin1'), common, entry, name);
    offset += 30 + name.length + body.length;
  }
  const entries = Buffer.concat(directory);
  const end = Buffer.alloc(22);
  end.write('PK\u0005\u0006', 0, 'latin1');
  end.writeUInt16LE(Object.keys(files).length, 8);
  end.writeUInt16LE(Object.keys(files).length, 10);
  end.writeUInt32LE(entries.length, 12);
  end.writeUInt32LE(offset, 16);
  return new Uint8Array(Buffer.concat([...bodies, entries, end]));
}

/** The texts of a zip file by their paths. */
export function unzip(bytes: Uint8Array): Record<string, string> {
  const file = Buffer.from(bytes);
  const end = file.lastIndexOf('PK\u0005\u0006', undefined, 'latin1');
  const files: Record<string, string> = {};
  let at = file.readUInt32LE(end + 16);
  for (let entries = file.readUInt16LE(end + 10); entries > 0; entries--) {
    const nameLength = file.readUInt16LE(at + 28);
    const name = file.toString('utf8', at + 46, at + 46 + nameLength);
    const head = file.readUInt32LE(at + 42);
    const start = head + 30 + file.readUInt16LE(head + 26) + file.readUInt16LE(head + 28);
    const body = file.subarray(start, start + file.readUInt32LE(at + 20));
    files[name] = (file.readUInt16LE(at + 10) === 0 ? body : inflateRawSync(body)).toString('utf8');
    at += 46 + nameLength + file.readUInt16LE(at + 30) + file.readUInt16LE(at + 32);
  }
  return files;
}

/** What a workbook written by hand holds. */
export interface HandWritten {
  /** Inside of `sheetData`, by sheet name. */
  readonly sheets: Readonly<Record<string, string>>;
  /** Inside of `definedNames`. */
  readonly names?: string;
  /** Inside of `styleSheet`. */
  readonly styles?: string;
  /** Inside of `worksheet` after the cells, for the first sheet. */
  readonly after?: string;
  /** Relations of the first sheet. */
  readonly relations?: string;
  /** Further parts by path. */
  readonly parts?: Readonly<Record<string, string>>;
}

const MAIN = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const OFFICE = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const PACKAGE = 'http://schemas.openxmlformats.org/package/2006';

/** An .xlsx file from the XML of its parts. */
export function xlsx({ sheets, names = '', styles = '', after = '', relations = '', parts = {} }: HandWritten): Uint8Array {
  const list = Object.entries(sheets);
  const relation = (id: string, type: string, target: string) => `<Relationship Id="${id}" Type="${OFFICE}/${type}" Target="${target}"/>`;
  return zip({
    '[Content_Types].xml': `<Types xmlns="${PACKAGE}/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/></Types>`,
    '_rels/.rels': `<Relationships xmlns="${PACKAGE}/relationships">${relation('r1', 'officeDocument', 'xl/workbook.xml')}</Relationships>`,
    'xl/workbook.xml': `<workbook xmlns="${MAIN}" xmlns:r="${OFFICE}"><sheets>${list
      .map(([name], i) => `<sheet name="${name}" sheetId="${i + 1}" r:id="s${i + 1}"/>`)
      .join('')}</sheets><definedNames>${names}</definedNames></workbook>`,
    'xl/_rels/workbook.xml.rels': `<Relationships xmlns="${PACKAGE}/relationships">${list
      .map((_, i) => relation(`s${i + 1}`, 'worksheet', `worksheets/sheet${i + 1}.xml`))
      .join('')}${relation('st', 'styles', 'styles.xml')}${relation('th', 'theme', 'theme/theme1.xml')}</Relationships>`,
    'xl/styles.xml': `<styleSheet xmlns="${MAIN}">${styles}</styleSheet>`,
    ...Object.fromEntries(
      list.map(([, data], i) => [
        `xl/worksheets/sheet${i + 1}.xml`,
        `<worksheet xmlns="${MAIN}" xmlns:r="${OFFICE}"><sheetData>${data}</sheetData>${i === 0 ? after : ''}</worksheet>`,
      ]),
    ),
    'xl/worksheets/_rels/sheet1.xml.rels': `<Relationships xmlns="${PACKAGE}/relationships">${relations}</Relationships>`,
    ...parts,
  });
}
