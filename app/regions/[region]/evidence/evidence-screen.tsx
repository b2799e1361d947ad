'use client';
import { useSearchParams } from 'next/navigation';
import { useQueryStates } from 'nuqs';
import { useState } from 'react';
import { Cautions } from '@/app/components/cautions';
import { percent } from '@/app/components/format';
import { stationHref } from '@/app/components/links';
import { LongWait } from '@/app/components/long-wait';
import { useBasisKeys } from '@/app/components/use-basis-keys';
import { type LongResult, useLongResult } from '@/app/components/use-long-result';
import type { ResolvedBasis } from '@/lib/basis';
import { lowFlowYearLabel } from '@/lib/calendar/low-flow-year';
import type { RegionBreaks } from '@/lib/region/break-types';
import type { Ranking } from '@/lib/region/ranking-types';
import type { RegionalAnswers } from '@/lib/region/regional-types';
import type { Alternative } from '@/lib/region/window-types';
import type { GroundSource } from '../_map/use-ground.ts';
import { figureKind, figureWords } from '../_ranking/figure-words.ts';
import { breaksFromText, breaksToText } from './_breaks/break-list.ts';
import { breaksSentence } from './_breaks/break-words.ts';
import { BreaksSection } from './_breaks/breaks-section.tsx';
import { ChanceSection } from './_chance/chance-section.tsx';
import { CommonSection } from './_common/common-section.tsx';
import { DrawingTool } from './_draw/drawing-tool.tsx';
import { termsSentence } from './_terms/term-words.ts';
import { TermsSection } from './_terms/terms-section.tsx';
import type { WindowCounts } from './_years/window-shares.ts';
import { windowsSentence } from './_years/window-words.ts';
import { YearsSection } from './_years/years-section.tsx';
import styles from './evidence.module.css';
import { evidenceAddresses } from './evidence-addresses.ts';
import { evidenceState, type SectionId } from './evidence-state.ts';
import { FallingNote } from './falling-note.tsx';
import { type Answered, TheAnswer } from './the-answer.tsx';
import { toldGroups } from './told-groups.ts';
import { useAfter } from './use-after.ts';
import { useOpenInPrint } from './use-open-in-print.ts';

export interface EvidenceStation {
  code: string;
  name: string;
  longitude: number | null;
  latitude: number | null;
  ranked: boolean;
}

interface Props {
  region: { slug: string; name: string; invented: boolean };
  basis: ResolvedBasis;
  /** the region's own terms as an address would write them */
  own: Readonly<Record<string, string>>;
  /** false where the address' terms cannot be used and the region's own are shown */
  usable: boolean;
  layers: readonly { id: number; name: string; kind: GroundSource['kind'] }[];
  counts: Ranking['counts'];
  stations: readonly EvidenceStation[];
}

/** Up to so many ranked stations are ranked on other terms unasked. */
const MOST_UNASKED = 200;

export function EvidenceScreen({ region, basis, own, usable, layers, counts, stations }: Props) {
  const query = useSearchParams().toString();
  const [state, set] = useQueryStates(evidenceState, { history: 'push', scroll: false });
  const [wanted, setWanted] = useState(false);
  const terms = useBasisKeys<Readonly<Record<string, string>>>(own);
  const askTerms = wanted || counts.ranked <= MOST_UNASKED;
  useOpenInPrint();
  const to = evidenceAddresses(region.slug, usable ? query : '', state);

  // One after another, so that the first answer has the workers to itself.
  const regional = useLongResult<RegionalAnswers>(to.regional());
  const windows = useLongResult<WindowCounts>(useAfter(regional) ? to.windows() : null);
  const breaks = useLongResult<RegionBreaks>(useAfter(windows) ? to.breaks() : null);
  const asksTerms = useAfter(breaks) && askTerms;
  const others = useLongResult<{ alternatives: Alternative[] }>(asksTerms ? to.alternatives() : null);
  const alternatives = { ...others, value: others.value?.alternatives ?? null };

  const alpha = percent(basis.alpha, basis.alpha < 0.01 ? 1 : 0);
  const names = new Map(stations.map(({ code, name }) => [code, name]));
  const nameOf = (code: string) => names.get(code) ?? code;
  const told = toldGroups(regional.value?.groups ?? []);
  const years = breaksFromText(state.breaks);
  const span = spanOf(windows.value, basis);

  const answers: Record<SectionId, Answered> = {
    chance: said(
      regional,
      told.map(({ sentences }) => sentences.chance),
      'Playing the years again',
      'Chance could not be told',
    ),
    common: said(
      regional,
      told.map(({ sentences }) => sentences.kendall),
      'Taking the stations together',
      'The common trend could not be tested',
    ),
    years: said(
      windows,
      [windows.value && windowsSentence(windows.value, alpha)],
      'Testing every window of years',
      'The windows could not be tested',
    ),
    terms: askTerms
      ? said(
          alternatives,
          [alternatives.value && termsSentence(alternatives.value)],
          'Ranking on other terms',
          'The other terms could not be tried',
        )
      : { sentences: [], instead: 'Not tried yet: with this many stations it takes a while.' },
    breaks: said(
      breaks,
      [breaks.value && breaksSentence(breaks.value)],
      'Comparing before and after',
      'Before and after could not be compared',
      'No ranked station has a break with enough years on both sides. One can be chosen below.',
    ),
  };

  return (
    <div className={styles.screen} aria-busy={terms.pending}>
      <TheAnswer of={region.name} answers={answers} />
      <FallingNote index={basis.index} />
      <ChanceSection
        answer={regional}
        method={state.chance}
        onMethod={(chance) => void set({ chance })}
        alpha={alpha}
        csv={to.regional('csv')}
        nameOf={nameOf}
        drawing={
          <DrawingTool
            region={region}
            layers={layers}
            stations={stations}
            area={state.area}
            onUse={(area) => void set({ area })}
          />
        }
      />
      <CommonSection answer={regional} figure={figureWords(figureKind(basis), basis.units)} csv={to.regional('csv')} />
      <YearsSection
        answer={windows}
        figure={state.years}
        onFigure={(figure) => void set({ years: figure })}
        period={basis.period}
        alpha={alpha}
        csv={to.windows('csv')}
      />
      <TermsSection
        answer={alternatives}
        asked={askTerms}
        stations={counts.ranked}
        onAsk={() => setWanted(true)}
        onUse={terms.set}
        movementOf={to.movement}
        csv={to.alternatives('csv')}
      />
      <BreaksSection
        answer={breaks}
        years={years}
        span={span}
        labelOf={(year) => lowFlowYearLabel(year, basis.yearStart)}
        onYears={(chosen) => void set({ breaks: breaksToText(chosen) })}
        alpha={basis.alpha}
        units={basis.units}
        csv={to.breaks('csv')}
        hrefOf={(code) => stationHref(region.slug, code, query)}
      />
      <Cautions />
    </div>
  );
}

/** The sentences where they are there; else how far they have come. */
function said(
  answer: Omit<LongResult<unknown>, 'valueOf'>,
  sentences: readonly (string | null | undefined)[],
  title: string,
  failed: string,
  silent = 'Nothing can be said on these terms.',
): Answered {
  const known = [...new Set(sentences)].filter(
    (sentence) => typeof sentence === 'string' && sentence !== '',
  ) as string[];
  if (known.length > 0 && !answer.pending) return { sentences: known, instead: null };
  if (answer.value !== null && !answer.pending) return { sentences: [], instead: silent };
  const waits = !answer.pending && answer.problem === null && !answer.cancelled;
  return {
    sentences: [],
    instead: waits ? 'Waits for the answers above…' : <LongWait answer={answer} title={title} failed={failed} brief />,
  };
}

/** Years that a break may lie between. */
function spanOf(windows: WindowCounts | null, { period }: ResolvedBasis): [number, number] {
  if (period) return period;
  const { starts = [], ends = [] } = windows ?? {};
  return starts.length > 0 && ends.length > 0 ? [starts[0], ends[ends.length - 1]] : [1900, 2100];
}
