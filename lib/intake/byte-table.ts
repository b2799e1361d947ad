/** Numbers the different byte strings it meets, 0, 1, 2, … in order of appearance, without making a string of each.
 *  A record names its station on every row, and nearly always the same one as the row before. */
export class ByteTable {
  private readonly keys: Uint8Array[] = [];
  private hashes: Int32Array = new Int32Array(64);
  /** index + 1 of the key in each slot, 0 when free; open addressing */
  private slots: Int32Array = new Int32Array(128);
  /** index of the key that came after each key last time: a file that goes day by day through its stations names them
   *  in the same order every day */
  private followers: Int32Array = new Int32Array(64);
  private last: Uint8Array = new Uint8Array(0);
  private lastIndex = -1;

  get size(): number {
    return this.keys.length;
  }

  /** The bytes that were last met; not to be changed. */
  get lastKey(): Uint8Array {
    return this.last;
  }

  /** The bytes numbered `index`. */
  key(index: number): Uint8Array {
    return this.keys[index];
  }

  /** Number of the byte string from `start` to `end` (exclusive), a new one when it was not met before. */
  intern(bytes: Uint8Array, start: number, end: number): number {
    const last = this.last;
    if (this.lastIndex >= 0 && last.length === end - start) {
      let at = 0;
      while (at < last.length && last[at] === bytes[start + at]) at++;
      if (at === last.length) return this.lastIndex;
    }
    const before = this.lastIndex;
    if (before >= 0) {
      const follower = this.followers[before];
      if (equals(this.keys[follower], bytes, start, end)) return this.remember(follower);
    }
    const index = this.find(bytes, start, end);
    if (before >= 0) this.followers[before] = index;
    return index;
  }

  private find(bytes: Uint8Array, start: number, end: number): number {
    let hash = -2128831035;
    for (let at = start; at < end; at++) hash = Math.imul(hash ^ bytes[at], 16777619);
    const mask = this.slots.length - 1;
    let slot = (hash ^ (hash >>> 15)) & mask;
    for (let entry = this.slots[slot]; entry !== 0; entry = this.slots[slot]) {
      const index = entry - 1;
      if (this.hashes[index] === hash && equals(this.keys[index], bytes, start, end)) return this.remember(index);
      slot = (slot + 1) & mask;
    }
    const index = this.keys.length;
    this.keys.push(bytes.slice(start, end));
    if (index === this.hashes.length) this.grow();
    this.hashes[index] = hash;
    this.place(index);
    return this.remember(index);
  }

  private remember(index: number): number {
    this.last = this.keys[index];
    this.lastIndex = index;
    return index;
  }

  private place(index: number): void {
    const mask = this.slots.length - 1;
    let slot = (this.hashes[index] ^ (this.hashes[index] >>> 15)) & mask;
    while (this.slots[slot] !== 0) slot = (slot + 1) & mask;
    this.slots[slot] = index + 1;
  }

  private grow(): void {
    const hashes = new Int32Array(this.hashes.length * 2);
    hashes.set(this.hashes);
    const followers = new Int32Array(hashes.length);
    followers.set(this.followers);
    this.followers = followers;
    const known = this.hashes.length;
    this.hashes = hashes;
    this.slots = new Int32Array(hashes.length * 2);
    for (let index = 0; index < known; index++) this.place(index);
  }
}

function equals(key: Uint8Array, bytes: Uint8Array, start: number, end: number): boolean {
  if (key.length !== end - start) return false;
  for (let at = 0; at < key.length; at++) if (key[at] !== bytes[start + at]) return false;
  return true;
}
