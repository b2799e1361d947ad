import Link from 'next/link';
import { regionHref } from '@/app/components/links';
import { Empty } from '@/app/components/notes';
import ui from '@/app/components/ui.module.css';

/** A region without stations: what to bring, and where to drop it. */
export function NoRecords({ slug, name }: { slug: string; name: string }) {
  return (
    <Empty title={`${name} has no stations yet`}>
      <p>
        Bring daily mean flows as text files, workbooks or WaterML, one for all stations or one each, packed or not. A
        registry with codes, names, coordinates and drainage areas puts the stations on the map; rivers and catchments
        as GeoJSON draw the ground.
      </p>
      <p>
        <Link href={regionHref(slug, 'import')} prefetch={false} className={ui.primary}>
          Import records
        </Link>
      </p>
    </Empty>
  );
}
