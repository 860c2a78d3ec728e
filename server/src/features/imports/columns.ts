/**
 * The columns of the lists that are taken in and given out, in plain words. The same for both ways,
 * so that an exported list, corrected in a spreadsheet, can be sent back.
 */
export interface Column {
  key: string;
  header: string;
  /** What stands in the example row of the template. */
  example: string;
  /** Must stand in every file and every row. */
  required?: true;
  /** Given out for the reader, and passed over when it comes back. */
  exportOnly?: true;
}

export type ListKind = 'stores' | 'machines' | 'parts';

const stores: Column[] = [
  { key: 'clientNumber', header: 'Client number', example: 'C-001' },
  { key: 'clientName', header: 'Client name', example: 'Harbour Suds' },
  { key: 'number', header: 'Store number', example: 'S-001', required: true },
  { key: 'name', header: 'Store name', example: 'Foxglove Lane', required: true },
  { key: 'address', header: 'Address', example: '12 Foxglove Lane' },
  { key: 'hours', header: 'Hours', example: '6:00 to 22:00' },
  { key: 'accessWords', header: 'How to get in', example: 'Key in the box by the back door' },
  { key: 'taxPlace', header: 'Tax place', example: '' },
  { key: 'tripPlace', header: 'Trip place', example: 'Town' },
  { key: 'tripMetres', header: 'Distance in metres', example: '12400' },
  { key: 'contactName', header: 'Statement contact', example: 'Ines Marlow' },
  { key: 'contactEmail', header: 'Statement e-mail', example: 'ines@laundry.example' },
  { key: 'contactPhone', header: 'Statement telephone', example: '+1 555 0100' },
  { key: 'endedOn', header: 'Ended on', example: '', exportOnly: true },
];

const machines: Column[] = [
  { key: 'storeNumber', header: 'Store number', example: 'S-001', required: true },
  { key: 'bay', header: 'Bay', example: 'A-01', required: true },
  { key: 'kind', header: 'Kind', example: 'Top loader', required: true },
  { key: 'energy', header: 'Energy', example: 'Electric' },
  { key: 'make', header: 'Make', example: 'Norvane' },
  { key: 'model', header: 'Model', example: 'TL-40' },
  { key: 'serial', header: 'Serial number', example: 'NV-20388' },
  { key: 'builtOn', header: 'Built on', example: '2029-03-01' },
  { key: 'installedOn', header: 'Installed on', example: '2029-05-14' },
  { key: 'volts', header: 'Volts', example: '120' },
  { key: 'amps', header: 'Amps', example: '12.5' },
  { key: 'vendPrice', header: 'Vend price', example: '3.50' },
  { key: 'cyclesADay', header: 'Cycles a day', example: '6.5' },
  { key: 'supplierWarrantyUntil', header: 'Supplier warranty until', example: '2031-05-14' },
  { key: 'note', header: 'Note', example: '' },
  { key: 'state', header: 'State', example: '', exportOnly: true },
  { key: 'storeName', header: 'Store name', example: '', exportOnly: true },
  { key: 'stickerCode', header: 'Sticker code', example: '', exportOnly: true },
  { key: 'endedOn', header: 'Retired on', example: '', exportOnly: true },
];

const parts: Column[] = [
  { key: 'number', header: 'Part number', example: 'NV-7731', required: true },
  { key: 'name', header: 'Name', example: 'Door hinge', required: true },
  { key: 'category', header: 'Category', example: 'door', required: true },
  { key: 'unitCost', header: 'Unit cost', example: '18.40', required: true },
  { key: 'fixedPrice', header: 'Fixed price', example: '' },
  { key: 'makersPart', header: "Maker's part", example: 'yes' },
  { key: 'scarce', header: 'Scarce', example: 'no' },
  { key: 'supplier', header: 'Supplier', example: 'Merrow Supply' },
  { key: 'supersededBy', header: 'Superseded by', example: '' },
  { key: 'endedOn', header: 'Ended on', example: '', exportOnly: true },
];

export const columnsOf: Record<ListKind, readonly Column[]> = { stores, machines, parts };

/** Those a file may bring; the others are passed over. */
export function importedColumns(kind: ListKind): Column[] {
  return columnsOf[kind].filter((column) => !column.exportOnly);
}
