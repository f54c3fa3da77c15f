import { open, type FileHandle } from 'node:fs/promises';
import { Readable } from 'node:stream';
import { createInflateRaw } from 'node:zlib';
import { AppError, invalid } from '../http/errors';

const MOST_PACKED_BYTES = 25 * 1024 * 1024;
const MOST_UNPACKED_BYTES = 300 * 1024 * 1024;
const MOST_ENTRIES = 2000;
const END_OF_DIRECTORY = 0x06054b50;
const DIRECTORY_ENTRY = 0x02014b50;
const STORED = 0;
const DEFLATED = 8;

/**
 * Lets a workbook through only where it is small, packed and unpacked. What the archive says of its own sizes is not
 * believed: every entry is unpacked once and its bytes counted.
 */
export async function guardWorkbook(filePath: string): Promise<void> {
  const file = await open(filePath);
  try {
    const { size } = await file.stat();
    if (size > MOST_PACKED_BYTES)
      throw tooLarge('The workbook is larger than 25 MB. Save it as CSV, or split it.');
    const entries = await readDirectory(file, size);
    let room = MOST_UNPACKED_BYTES;
    for (const entry of entries) room -= await unpackedBytes(file, entry, room);
  } finally {
    await file.close();
  }
}

const tooLarge = (detail: string) => new AppError('tooLarge', detail);
const damaged = () =>
  invalid('The workbook is damaged: it cannot be unpacked. Open it, save it again and send that.');

type Entry = { method: number; packedBytes: number; offset: number };

async function readDirectory(file: FileHandle, size: number): Promise<Entry[]> {
  const tail = await readAt(file, Math.max(0, size - 66_000), Math.min(size, 66_000));
  let end = tail.length - 22;
  while (end >= 0 && tail.readUInt32LE(end) !== END_OF_DIRECTORY) end -= 1;
  if (end < 0) throw damaged();
  const count = tail.readUInt16LE(end + 10);
  const bytes = tail.readUInt32LE(end + 12);
  const start = tail.readUInt32LE(end + 16);
  if (count > MOST_ENTRIES)
    throw tooLarge('The workbook holds more parts than any workbook of records does.');
  if (start + bytes > size) throw damaged();
  const directory = await readAt(file, start, bytes);
  const entries: Entry[] = [];
  for (let at = 0; entries.length < count;) {
    if (at + 46 > directory.length || directory.readUInt32LE(at) !== DIRECTORY_ENTRY) throw damaged();
    entries.push({
      method: directory.readUInt16LE(at + 10),
      packedBytes: directory.readUInt32LE(at + 20),
      offset: directory.readUInt32LE(at + 42),
    });
    at +=
      46 +
      directory.readUInt16LE(at + 28) +
      directory.readUInt16LE(at + 30) +
      directory.readUInt16LE(at + 32);
  }
  return entries;
}

async function unpackedBytes(file: FileHandle, entry: Entry, room: number): Promise<number> {
  const header = await readAt(file, entry.offset, 30);
  if (header.length < 30) throw damaged();
  const packed = await readAt(
    file,
    entry.offset + 30 + header.readUInt16LE(26) + header.readUInt16LE(28),
    Math.min(entry.packedBytes, MOST_PACKED_BYTES),
  );
  if (entry.method === STORED) return packed.length;
  if (entry.method !== DEFLATED) throw damaged();
  let count = 0;
  try {
    for await (const chunk of Readable.from([packed]).pipe(createInflateRaw())) {
      count += (chunk as Buffer).length;
      if (count > room) break;
    }
  } catch {
    throw damaged();
  }
  if (count > room) throw tooLarge('The workbook unpacks to more than 300 MB. Save it as CSV, or split it.');
  return count;
}

async function readAt(file: FileHandle, position: number, length: number): Promise<Buffer> {
  const { buffer, bytesRead } = await file.read(Buffer.alloc(length), 0, length, position);
  return buffer.subarray(0, bytesRead);
}
