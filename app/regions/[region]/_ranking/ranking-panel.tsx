'use client';
import { Tabs } from '@base-ui/react/tabs';
import { memo, useCallback, useMemo } from 'react';
import { Cautions } from '@/app/components/cautions';
import { fixed, MISSING, type Units } from '@/app/components/format';
import { needleOf } from '@/app/components/needle';
import ui from '@/app/components/ui.module.css';
import type { Basis } from '@/lib/basis';
import { INDEX_WORDS } from '@/lib/region/index-words';
import type { RankingMovement } from '@/lib/region/window-types';
import { detectableText } from '../_certainty/detectable-text.ts';
import { movementWords } from '../_certainty/movement-words.ts';
import { toldApartWords } from '../_certainty/place-words.ts';
import type { CertaintyAnswer } from '../_certainty/use-certainty.ts';
import type { HoverStore } from '../hover-store.ts';
import type { MapRow } from '../map-row.ts';
import type { Tab } from '../map-state.ts';
import { hasPlace, tabOf } from '../row-filter.ts';
import { DownloadMenu } from './download-menu.tsx';
import { figureKind } from './figure-words.ts';
import styles from './ranking-panel.module.css';
import { RankingTable } from './ranking-table.tsx';
import { ReasonList } from './reason-list.tsx';
import type { Moved } from './station-row.tsx';
import { SurenessTools } from './sureness-tools.tsx';

interface RankingPanelProps {
  slug: string;
  regionName: string;
  rows: MapRow[];
  found: Set<string> | null;
  /** codes inside the map's frame; null until the map has told */
  inView: Set<string> | null;
  follow: boolean;
  onFollow: (follow: boolean) => void;
  search: string;
  onSearch: (search: string) => void;
  tab: Tab;
  onTab: (tab: Tab) => void;
  rankBy: Basis['rankBy'];
  index: Basis['index'];
  units: Units;
  span: [number, number];
  hover: HoverStore;
  selected: string | null;
  onSelect: (code: string | null) => void;
  certainty: CertaintyAnswer;
  /** of the steepest declines, and how it is changed */
  k: number;
  onK: (k: number) => void;
  /** against the region's own terms; null while these are those */
  movement: RankingMovement | null;
}

/** The lists beside the map: ranked, drying, not ranked; what is counted; search, following the map, files. */
export const RankingPanel = memo(function RankingPanel(props: RankingPanelProps) {
  const { slug, regionName, rows, found, inView, follow, onFollow, search, onSearch, tab, onTab } = props;
  const { rankBy, index, units, span, hover, selected, onSelect, certainty, k, onK, movement } = props;
  const lists = useMemo(() => byTab(rows), [rows]);
  const shown = useMemo(() => {
    // a station without a place is never out of view
    const isShown = (row: MapRow) =>
      (found === null || found.has(row.code)) && (!follow || inView === null || !hasPlace(row) || inView.has(row.code));
    return byTab(rows.filter(isShown));
  }, [rows, found, follow, inView]);
  const placed = useMemo(() => rows.filter(hasPlace), [rows]);
  const rankedInView = inView === null ? null : lists.ranked.filter((row) => inView.has(row.code)).length;
  const { view, pending } = certainty;
  const sureness = useMemo(() => ({ view, waiting: pending, k }), [view, pending, k]);
  const movedOf = useMemo(() => {
    const moved = movement && placesMoved(movement);
    return moved && ((code: string) => moved.get(code) ?? null);
  }, [movement]);
  const detectableOf = useCallback(
    (row: MapRow) => {
      const trend = view?.detectable.get(row.code);
      if (!trend || needleOf(row).significant) return null;
      const text = detectableText(trend, { index, units, drying: row.drying });
      return text === MISSING ? null : text;
    },
    [view, index, units],
  );
  const table = { slug, units, span, hover, selected, onSelect, movedOf, detectableOf };

  return (
    <section aria-label="Ranking" className={styles.panel}>
      <div className={styles.bar}>
        <p className={styles.counts} role="status">
          <b>{fixed(lists.ranked.length)} ranked</b>
          {rankedInView !== null && placed.length > 0 && <>, {fixed(rankedInView)} in view</>}
          {found !== null && (
            <>
              , {fixed(found.size)} {found.size === 1 ? 'matches' : 'match'}
            </>
          )}
        </p>
        {placed.length > 0 && (
          <label className={ui.check}>
            <input type="checkbox" checked={follow} onChange={(event) => onFollow(event.target.checked)} />
            Follow the map
          </label>
        )}
        <div className={styles.tools}>
          <input
            type="search"
            className={`${ui.input} ${styles.search}`}
            placeholder="Find a station"
            aria-label="Find a station by name, code or river"
            value={search}
            onChange={(event) => onSearch(event.target.value)}
          />
          <DownloadMenu slug={slug} shown={shown[tab].map((row) => row.code)} all={rows.length} />
        </div>
      </div>
      {view && !view.toldApart && <p className={styles.apart}>{toldApartWords(view)}</p>}
      {movement && <p className={styles.moved}>{movementWords(movement)}</p>}
      <Tabs.Root value={tab} onValueChange={(value) => onTab(value as Tab)} className={styles.tabs}>
        <div className={styles.tabRow}>
          <Tabs.List className={styles.tabList} aria-label="Lists">
            <Tabs.Tab value="ranked" className={styles.tab}>
              Ranking <span>{fixed(shown.ranked.length)}</span>
            </Tabs.Tab>
            {(lists.drying.length > 0 || tab === 'drying') && (
              <Tabs.Tab value="drying" className={styles.tab}>
                Drying <span>{fixed(shown.drying.length)}</span>
              </Tabs.Tab>
            )}
            {(lists.unranked.length > 0 || tab === 'unranked') && (
              <Tabs.Tab value="unranked" className={styles.tab}>
                Not ranked, and why <span>{fixed(shown.unranked.length)}</span>
              </Tabs.Tab>
            )}
          </Tabs.List>
          {lists.ranked.length > 0 && <SurenessTools answer={certainty} places={lists.ranked.length} k={k} onK={onK} />}
        </div>
        <Tabs.Panel value="ranked" className={styles.list}>
          <NoneShown shown={shown.ranked.length} of={lists.ranked.length} list="ranked" />
          {shown.ranked.length > 0 && (
            <RankingTable
              {...table}
              caption={`Stations of ${regionName} in order of trend, most strongly declining first`}
              rows={shown.ranked}
              all={lists.ranked}
              figure={figureKind({ rankBy, index })}
              index={index}
              sureness={sureness}
            />
          )}
        </Tabs.Panel>
        <Tabs.Panel value="drying" className={styles.list}>
          <p className={styles.lead}>
            At these stations a third or more of the {INDEX_WORDS[index].many} are 0, so their slope says nothing. They
            are ordered by the change in days without flow.
          </p>
          <NoneShown shown={shown.drying.length} of={lists.drying.length} list="drying" />
          {shown.drying.length > 0 && (
            <RankingTable
              {...table}
              caption={`Stations of ${regionName} in order of change in days without flow`}
              rows={shown.drying}
              all={lists.drying}
              figure="zero-days"
              index="minimum"
              sureness={null}
            />
          )}
        </Tabs.Panel>
        <Tabs.Panel value="unranked" className={styles.list}>
          <NoneShown shown={shown.unranked.length} of={lists.unranked.length} list="unranked" />
          <ReasonList slug={slug} rows={shown.unranked} hover={hover} selected={selected} />
        </Tabs.Panel>
      </Tabs.Root>
      <Cautions />
    </section>
  );
});

function placesMoved({ movements }: RankingMovement): Map<string, Moved> {
  const compared = movements.filter(({ after }) => after !== null);
  return new Map(compared.map(({ code, moved, before }) => [code, { places: moved, before }]));
}

function byTab(rows: MapRow[]): Record<Tab, MapRow[]> {
  const lists: Record<Tab, MapRow[]> = { ranked: [], drying: [], unranked: [] };
  for (const row of rows) lists[tabOf(row)].push(row);
  return lists;
}

const LIST_WORDS: Record<Tab, [string, string]> = {
  ranked: ['No station is ranked on these terms. The reasons are in the list “Not ranked, and why”.', 'ranked'],
  drying: ['No station is drying on these terms.', 'drying'],
  unranked: ['Every station is ranked on these terms.', 'unranked'],
};

/** Why a list is empty: nothing belongs in it, or search and map leave nothing. */
function NoneShown({ shown, of, list }: { shown: number; of: number; list: Tab }) {
  if (shown > 0) return null;
  const [none, word] = LIST_WORDS[list];
  return (
    <p className={styles.none}>
      {of === 0
        ? none
        : `None of the ${fixed(of)} ${word} stations is in view and found. Move the map, stop following it, or change the search.`}
    </p>
  );
}
