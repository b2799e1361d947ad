import Link from 'next/link';
import { Header } from './components/header.tsx';
import { Empty } from './components/notes.tsx';

export default function NotFound() {
  return (
    <>
      <Header />
      <main id="main">
        <Empty title="There is no such page">
          <p>
            A region may have been renamed or removed. <Link href="/">All regions</Link> are on the first page.
          </p>
        </Empty>
      </main>
    </>
  );
}
