import { crc32, deflateRawSync } from 'node:zlib';

/** A ZIP archive (APPNOTE 6.3.10, deflated, names in UTF-8) of the files given. Node's own packing takes a fortieth of the
 *  time that one in JavaScript does, which tells where a hundred megabytes are packed. */
export function zipped(files: Readonly<Record<string, string | Uint8Array>>): Uint8Array {
  const local: Buffer[] = [];
  const central: Buffer[] = [];
  let offset = 0;
  for (const [name, content] of Object.entries(files)) {
    const bytes = typeof content === 'string' ? Buffer.from(content) : content;
    const packed = deflateRawSync(bytes, { level: 9 });
    const path = Buffer.from(name);
    // version 2.0, UTF-8, deflated, 1980-01-01 00:00
    const about = Buffer.alloc(26);
    for (const [value, at] of [
      [20, 0],
      [0x800, 2],
      [8, 4],
      [0x21, 8],
      [path.length, 22],
    ] as const)
      about.writeUInt16LE(value, at);
    about.writeUInt32LE(crc32(bytes), 10);
    about.writeUInt32LE(packed.length, 14);
    about.writeUInt32LE(bytes.length, 18);
    local.push(Buffer.from('PK\x03\x04', 'latin1'), about, path, packed);
    const place = Buffer.alloc(14);
    place.writeUInt32LE(offset, 10);
    central.push(Buffer.from('PK\x01\x02\x14\x00', 'latin1'), about, place, path);
    offset += 30 + path.length + packed.length;
  }
  const end = Buffer.alloc(22);
  end.write('PK\x05\x06', 'latin1');
  const count = Object.keys(files).length;
  end.writeUInt16LE(count, 8);
  end.writeUInt16LE(count, 10);
  end.writeUInt32LE(Buffer.concat(central).length, 12);
  end.writeUInt32LE(offset, 16);
  return Uint8Array.from(Buffer.concat([...local, ...central, end]));
}
