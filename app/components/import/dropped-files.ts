/** Every file that was dropped, also those in folders, however deep. Files that the system hides are left away. */
export async function filesIn(transfer: DataTransfer): Promise<File[]> {
  const entries = [...transfer.items].map((item) => item.webkitGetAsEntry?.() ?? null);
  const files = [...transfer.files];
  if (!entries.some((entry) => entry?.isDirectory)) return files;
  const found = await Promise.all(entries.map((entry) => (entry ? below(entry) : [])));
  return found.flat();
}

async function below(entry: FileSystemEntry): Promise<File[]> {
  if (entry.name.startsWith('.')) return [];
  if (entry.isFile) return [await fileOf(entry as FileSystemFileEntry)];
  const entries = await entriesOf(entry as FileSystemDirectoryEntry);
  return (await Promise.all(entries.map(below))).flat();
}

const fileOf = (entry: FileSystemFileEntry): Promise<File> =>
  new Promise((resolve, reject) => entry.file(resolve, reject));

/** A reader gives a hundred entries at a time, and none at the end. */
async function entriesOf(folder: FileSystemDirectoryEntry): Promise<FileSystemEntry[]> {
  const reader = folder.createReader();
  const entries: FileSystemEntry[] = [];
  for (;;) {
    const some = await new Promise<FileSystemEntry[]>((resolve, reject) => reader.readEntries(resolve, reject));
    if (some.length === 0) return entries;
    entries.push(...some);
  }
}
