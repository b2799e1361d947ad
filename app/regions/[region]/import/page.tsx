import type { Metadata } from 'next';
import { Header } from '@/app/components/header';
import { FileReport } from '@/app/components/import/report-view';
import { waitingOf } from '@/app/components/import/waiting';
import { ImportForm } from '@/app/components/import-form';
import type { ImportReport } from '@/lib/intake/types';
import { uploadsOf } from '@/lib/jobs/open-upload';
import { getImportReport, listImports } from '@/lib/store/imports';
import { listJobs } from '@/lib/store/jobs';
import { type PageQuery, pageRequest } from '../page-request';
import { ImportHistory } from './import-history';
import styles from './import-page.module.css';
import { TakeAlong } from './take-along';

export const metadata: Metadata = { title: 'Import' };

interface Props {
  params: Promise<{ region: string }>;
  searchParams: Promise<PageQuery>;
}

/** Bring files into a region, see what became of them, and take an import back. */
export default async function ImportPage({ params, searchParams }: Props) {
  const { region, query } = await pageRequest((await params).region, await searchParams);
  const [imports, jobs, uploads] = await Promise.all([
    listImports(region.id),
    listJobs({ regionId: region.id, limit: 20 }),
    uploadsOf(region.id),
  ]);
  const running = jobs.find((job) => job.kind === 'import' && (job.state === 'waiting' || job.state === 'running'));
  const importing = uploads.find(({ job }) => job && job.id === running?.id);
  const upload = importing?.id ?? query.get('upload');
  const asked = imports.find((entry) => String(entry.id) === query.get('report'));
  const past = asked?.kind === 'flows' ? await getImportReport(region.id, asked.id) : null;
  return (
    <>
      <Header region={region} page="import" />
      <main id="main" className={styles.page}>
        <header>
          <h1>Import</h1>
          <p className={styles.lead}>
            Files of one import are taken together or not at all, and every import can be undone. Nothing is dropped in
            silence: each rejected row is listed with its reason.
          </p>
        </header>
        <ImportForm
          region={region.slug}
          runningJob={running?.id ?? null}
          openUpload={upload}
          waiting={uploads.map(waitingOf)}
          hasRecords={imports.some(({ kind }) => kind === 'flows')}
        />
        {asked && past && (
          <FileReport
            file={{
              importId: asked.id,
              file: asked.fileName,
              kind: asked.kind,
              summary: '',
              report: past.report as ImportReport,
              warnings: [],
              revisions: asked.revisions,
            }}
            rejectedHref={`/api/regions/${encodeURIComponent(region.slug)}/imports/${asked.id}/rejected`}
          />
        )}
        <ImportHistory
          shown={asked?.id ?? null}
          query={query.toString()}
          slug={region.slug}
          imports={imports.map((entry) => ({
            id: entry.id,
            when: entry.createdAt.toISOString(),
            by: entry.by,
            kind: entry.kind,
            fileName: entry.fileName,
            unit: entry.unit,
            rows: entry.rows,
            accepted: entry.accepted,
            rejected: entry.rejected,
            undoing: entry.undoing,
            sha256: entry.sha256,
            rule: entry.rule,
            revisions: entry.revisions,
          }))}
        />
        {imports.length > 0 && <TakeAlong slug={region.slug} />}
      </main>
    </>
  );
}
