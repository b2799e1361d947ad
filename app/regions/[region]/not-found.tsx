import Link from 'next/link';
import { Header } from '@/app/components/header';
import { Empty } from '@/app/components/notes';

export default function RegionNotFound() {
  return (
    <>
      <Header />
      <main id="main">
        <Empty title="There is no region of that name">
          <p>
            It may have been renamed or removed. <Link href="/">All regions</Link> are on the first page.
          </p>
        </Empty>
      </main>
    </>
  );
}
