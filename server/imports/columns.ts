import type { ImportKind } from '../../shared/imports';

export type ColumnType =
  | 'text'
  | 'line'
  | 'longText'
  | 'date'
  | 'hours'
  | 'quantity'
  | 'money'
  | 'days'
  | 'ticketType'
  | 'productType'
  | 'useClass'
  | 'lineKind'
  | 'lineReason'
  | 'workDone'
  | 'payType';

export type Column = {
  name: string;
  label: string;
  about: string;
  type: ColumnType;
  isRequired: boolean;
  /** Headers of other programs that plainly mean it, folded to words. */
  headers: readonly string[];
};

const column = (
  name: string,
  type: ColumnType,
  label: string,
  about: string,
  headers: readonly string[] = [],
): Column => ({ name, type, label, about, headers, isRequired: false });
const required = (one: Column): Column => ({ ...one, isRequired: true });

const MACHINE = {
  serial: column('unit_serial', 'text', 'Machine serial', 'The serial number on the machine’s plate', [
    'serial',
    'serial number',
    'serial no',
    'serial num',
    'sn',
    's n',
    'machine serial',
    'equipment serial',
    'unit serial number',
    'vin',
  ]),
  ref: column('unit_ref', 'text', 'Your tag', 'The shop’s own number for the machine', [
    'unit number',
    'unit no',
    'unit id',
    'equipment id',
    'equipment number',
    'asset',
    'asset number',
    'asset id',
    'tag',
    'tag number',
    'machine id',
    'fleet number',
  ]),
  maker: column('maker', 'text', 'Maker', 'Who made the machine', [
    'make',
    'brand',
    'manufacturer',
    'mfr',
    'mfg',
    'machine make',
    'equipment make',
  ]),
  model: column('model', 'text', 'Model', 'The maker’s model code', [
    'model number',
    'model no',
    'model code',
    'machine model',
    'equipment model',
    'mdl',
  ]),
  productType: column(
    'product_type',
    'productType',
    'Kind of machine',
    'Lawn tractor, zero turn, walk behind, handheld, snow, utility or other',
    ['type', 'machine type', 'equipment type', 'category', 'product category', 'unit type'],
  ),
  inService: column('in_service_on', 'date', 'In service since', 'The day the machine was first used', [
    'in service date',
    'in service',
    'purchase date',
    'date of purchase',
    'purchased',
    'sold date',
    'sale date',
    'date sold',
    'delivery date',
  ]),
  useClass: column('use_class', 'useClass', 'Use', 'Homeowner, commercial, rental or municipal', [
    'use',
    'usage',
    'customer type',
    'use type',
  ]),
  hours: column('meter_hours', 'hours', 'Hour meter', 'The reading of the hour meter', [
    'hours',
    'hour meter',
    'meter',
    'meter reading',
    'hrs',
    'engine hours',
    'machine hours',
    'hours in',
    'unit hours',
  ]),
};

/** Every column of each kind of file, in the order in which files are written. */
export const COLUMNS: Record<ImportKind, readonly Column[]> = {
  repairs: [
    column('location', 'text', 'Location', 'Which of your locations; may be missing', [
      'store',
      'branch',
      'shop',
      'site',
      'location name',
      'store number',
    ]),
    required(
      column('repair_number', 'text', 'Repair number', 'The number of the work order', [
        'repair order',
        'repair order number',
        'ro',
        'ro number',
        'ro no',
        'work order',
        'work order number',
        'work order no',
        'wo',
        'wo number',
        'wo no',
        'ticket',
        'ticket number',
        'ticket no',
        'job number',
        'job no',
        'job',
        'invoice',
        'invoice number',
        'invoice no',
        'order number',
        'order no',
        'repair no',
      ]),
    ),
    column('ticket_type', 'ticketType', 'Kind of ticket', 'Repair, setup, counter sale or internal', [
      'order type',
      'wo type',
      'job type',
      'ro type',
    ]),
    column('opened_on', 'date', 'Opened', 'The day the machine came in', [
      'opened',
      'open date',
      'date in',
      'date opened',
      'received',
      'date received',
      'drop off',
      'created',
      'created date',
      'date created',
      'in date',
    ]),
    column('ready_on', 'date', 'Ready', 'The day the work was done', [
      'ready',
      'ready date',
      'completed',
      'date completed',
      'completion date',
      'complete date',
      'finished',
      'done date',
    ]),
    required(
      column('closed_on', 'date', 'Closed', 'The day the repair was closed', [
        'closed',
        'close date',
        'date closed',
        'closed date',
        'invoice date',
        'invoiced',
        'date invoiced',
        'date',
        'date out',
        'out date',
        'cashed out',
        'billed',
      ]),
    ),
    column('picked_up_on', 'date', 'Picked up', 'The day the customer fetched it', [
      'picked up',
      'pickup',
      'pick up',
      'pickup date',
      'pick up date',
      'delivered',
      'date delivered',
    ]),
    MACHINE.serial,
    MACHINE.ref,
    column('customer_ref', 'text', 'Customer number', 'Your number for the customer', [
      'customer',
      'customer id',
      'customer number',
      'customer no',
      'cust',
      'cust no',
      'cust id',
      'cust number',
      'account',
      'account number',
      'account no',
      'acct',
    ]),
    column('customer_name', 'text', 'Customer name', 'Never leaves the shop', [
      'name',
      'cust name',
      'bill to',
      'bill to name',
      'owner',
      'owner name',
    ]),
    column('customer_phone', 'text', 'Customer phone', 'Never leaves the shop', [
      'phone',
      'telephone',
      'phone number',
      'cell',
      'mobile',
      'cust phone',
    ]),
    MACHINE.maker,
    MACHINE.model,
    MACHINE.productType,
    column('engine_maker', 'text', 'Engine maker', 'Who made the engine', [
      'engine make',
      'engine brand',
      'engine mfr',
      'eng make',
    ]),
    column('engine_model', 'text', 'Engine model', 'The engine’s model or code', [
      'engine',
      'engine model number',
      'engine code',
      'eng model',
    ]),
    column('engine_serial', 'text', 'Engine serial', 'The number on the engine’s plate', [
      'engine serial number',
      'engine serial no',
      'engine sn',
      'eng serial',
    ]),
    MACHINE.inService,
    MACHINE.useClass,
    MACHINE.hours,
    column('complaint', 'longText', 'Complaint', 'What the customer said', [
      'concern',
      'customer complaint',
      'customer concern',
      'problem',
      'problem description',
      'symptom',
      'reported problem',
      'request',
      'service requested',
    ]),
    column('cause', 'longText', 'Cause', 'What was found', [
      'diagnosis',
      'findings',
      'finding',
      'found',
      'cause of failure',
    ]),
    column('correction', 'longText', 'Correction', 'What was done', [
      'resolution',
      'work performed',
      'work description',
      'repair description',
      'repairs performed',
      'action taken',
      'service performed',
      'solution',
    ]),
    column('notes', 'longText', 'Notes', 'Anything else', [
      'note',
      'comment',
      'comments',
      'remarks',
      'remark',
      'memo',
      'internal notes',
      'tech notes',
    ]),
    column('technician', 'text', 'Technician', 'Who worked on it; several names each', [
      'tech',
      'mechanic',
      'tech name',
      'technician name',
      'serviced by',
      'assigned to',
      'employee',
    ]),
    column('line_kind', 'lineKind', 'Kind of line', 'Part, labor, work, fee or note', [
      'line type',
      'item type',
    ]),
    column('part_number', 'text', 'Part number', 'The maker’s number of the part', [
      'part',
      'part no',
      'part num',
      'pn',
      'p n',
      'item',
      'item number',
      'item no',
      'sku',
      'part code',
      'stock number',
    ]),
    column('part_maker', 'text', 'Part maker', 'Whose number it is; the machine’s maker where missing', [
      'part brand',
      'part manufacturer',
      'part mfr',
      'line code',
      'mfr code',
      'vendor code',
    ]),
    column('part_description', 'line', 'Part description', 'The words on the line', [
      'description',
      'item description',
      'part desc',
      'desc',
      'part name',
      'line description',
    ]),
    column('supplier', 'text', 'Supplier', 'Where it was bought', ['vendor', 'distributor', 'source']),
    column('component', 'text', 'Component', 'What the part is: belt, coil, spindle …', [
      'part category',
      'part group',
      'component name',
      'assembly',
    ]),
    column(
      'line_reason',
      'lineReason',
      'Why it was changed',
      'Failed, maintenance, preventive, damage or upgrade',
      ['reason', 'failure reason', 'reason code', 'reason replaced'],
    ),
    column(
      'work_done',
      'workDone',
      'Work without a part',
      'Adjusted, cleaned, repaired, tightened, tested good or nothing found',
      ['work', 'action', 'work type'],
    ),
    column('quantity', 'quantity', 'Quantity', 'How many', [
      'qty',
      'qty sold',
      'quantity sold',
      'count',
      'units',
    ]),
    column('part_amount', 'money', 'Amount', 'The extended price of the line', [
      'amount',
      'part total',
      'parts total',
      'line total',
      'extended',
      'extended price',
      'ext price',
      'ext',
      'line amount',
      'parts amount',
      'total price',
    ]),
    column('part_cost', 'money', 'Cost', 'What the line cost you', [
      'cost',
      'extended cost',
      'ext cost',
      'parts cost',
    ]),
    column('labor_op', 'text', 'Labor operation', 'The code of the job', [
      'labor code',
      'op code',
      'opcode',
      'operation',
      'operation code',
      'job code',
      'labor operation',
    ]),
    column('labor_hours', 'quantity', 'Labor hours', 'Hours of labor, summed over the rows', [
      'labor hrs',
      'labour hours',
      'hours billed',
      'billed hours',
      'labor time',
      'tech hours',
      'labor qty',
    ]),
    column('labor_amount', 'money', 'Labor amount', 'Labor billed, summed over the rows', [
      'labor',
      'labour',
      'labor total',
      'labor charge',
      'labour amount',
      'labor price',
    ]),
    column('line_technician', 'text', 'Technician of the line', 'Where it differs by line', [
      'line tech',
      'labor tech',
    ]),
    column('line_pay_type', 'payType', 'Who pays the line', 'Customer, warranty or shop', [
      'line pay type',
      'line type of pay',
    ]),
    column('pay_type', 'payType', 'Who pays', 'Customer, warranty or shop', [
      'payment type',
      'paid by',
      'bill type',
      'charge to',
      'payer',
    ]),
  ],
  units: [
    MACHINE.serial,
    MACHINE.ref,
    MACHINE.maker,
    MACHINE.model,
    MACHINE.productType,
    MACHINE.inService,
    MACHINE.useClass,
    MACHINE.hours,
    column('meter_read_on', 'date', 'Meter read on', 'The day of that reading', [
      'reading date',
      'meter date',
      'hours date',
      'read date',
    ]),
    column(
      'known_from_on',
      'date',
      'Looked after since',
      'From this day on you would have seen its repairs',
      ['known from', 'customer since', 'under care since', 'registered', 'registration date'],
    ),
  ],
  parts: [
    required(
      column('part_number', 'text', 'Part number', 'The maker’s number of the part', [
        'part',
        'part no',
        'pn',
        'item',
        'item number',
        'item no',
        'sku',
        'number',
      ]),
    ),
    column('maker', 'text', 'Maker', 'Whose number it is', [
      'make',
      'brand',
      'manufacturer',
      'mfr',
      'line code',
    ]),
    column('supplier', 'text', 'Supplier', 'Where it is bought', ['vendor', 'distributor', 'source']),
    column('description', 'line', 'Description', 'What it is called', [
      'desc',
      'item description',
      'part description',
      'name',
      'part name',
    ]),
    column('component', 'text', 'Component', 'What the part is: belt, coil, spindle …', [
      'category',
      'part category',
      'group',
      'assembly',
    ]),
    column('system', 'text', 'System', 'What the component belongs to: deck, drive, ignition …', [
      'part system',
      'section',
    ]),
    column('superseded_by', 'text', 'Superseded by', 'The newer number', [
      'supersedes to',
      'new part number',
      'replaced by',
      'superseded',
      'supersession',
    ]),
    column('fitment_note', 'longText', 'Fitment note', 'What to mind when it is fitted', [
      'fitment',
      'fits',
      'note',
      'notes',
      'comment',
    ]),
    column('list_price', 'money', 'List price', 'The maker’s list price', [
      'price',
      'list',
      'retail',
      'msrp',
      'retail price',
      'unit price',
    ]),
    column('warranty_days', 'days', 'Warranty days', 'How long the part is covered', [
      'warranty',
      'part warranty',
      'warranty period',
    ]),
  ],
};

/** What `rejected.csv` adds to the rows; ignored when the corrected file comes back. */
export const REPORT_HEADERS = ['import_line', 'import_errors', 'import_mend'] as const;

/** Letters and digits of a header, in words: `Repair No.` and `repair_no` are the same. */
export const foldHeader = (header: string): string =>
  header
    .replace(/#/g, ' number ')
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim();
