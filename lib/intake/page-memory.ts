import { NO_ROW } from '../series/day-codes.ts';
import { type FiledPage, PageFile } from './page-file.ts';
import { emptyPage, type OpenPage, type PackedPage, pack, unpack } from './pages.ts';

/** A page in any of its three states: open, packed, or written to a file. */
export type StoredPage = OpenPage | PackedPage | FiledPage;

export interface PageLimits {
  /** pages (9 kB each) that may stay open before those that their station has left are packed, which halves them */
  open?: number;
  /** pages that may stay packed before further ones go to a file */
  packed?: number;
  /** where that file lies while it is needed */
  scratch?: string;
}

/** The pages that all stations of a file share a memory for, so that a file of any size is read in a bounded one. Up to a
 *  number pages stay as they are; beyond it, those that their station has left are packed; beyond a second, they are
 *  written to a file. */
export class PageMemory {
  private readonly spare: OpenPage[] = [];
  private readonly limits: Required<Omit<PageLimits, 'scratch'>>;
  private readonly file: PageFile;
  private opened = 0;
  private packed = 0;

  constructor({ open = 8192, packed = 24_576, scratch }: PageLimits = {}) {
    this.limits = { open, packed };
    this.file = new PageFile(scratch);
  }

  /** An empty page. */
  take(): OpenPage {
    const page = this.blank();
    page.values.fill(Number.NaN);
    page.codes.fill(NO_ROW);
    return page;
  }

  get full(): boolean {
    return this.opened > this.limits.open;
  }

  /** True when pages must be put away however soon they are needed again. */
  get overfull(): boolean {
    return this.opened > 2 * this.limits.open;
  }

  /** Puts an open page away. */
  put(page: OpenPage): StoredPage {
    const small = this.packed < this.limits.packed ? pack(page) : null;
    if (small !== null) this.packed++;
    else if (this.packed < this.limits.packed && !this.overfull) return page;
    const stored = small ?? this.file.write(page);
    this.opened--;
    if (this.spare.length < 64) this.spare.push(page);
    return stored;
  }

  /** Opens a page that is to be written on. */
  open(page: StoredPage): OpenPage {
    if ('values' in page) return page;
    const opened = this.blank();
    if ('mantissas' in page) {
      this.packed--;
      return unpack(page, opened);
    }
    return this.file.read(page, opened);
  }

  /** A page's days, for a look. */
  look(page: StoredPage): OpenPage {
    if ('values' in page) return page;
    return 'mantissas' in page ? unpack(page, emptyPage()) : this.file.read(page, emptyPage());
  }

  /** A page is not needed any more. */
  drop(page: StoredPage): void {
    if ('values' in page) this.opened--;
    else if ('mantissas' in page) this.packed--;
    else this.file.drop(page);
  }

  /** Ends all use of the file. */
  close(): void {
    this.file.close();
  }

  private blank(): OpenPage {
    this.opened++;
    return this.spare.pop() ?? emptyPage();
  }
}
