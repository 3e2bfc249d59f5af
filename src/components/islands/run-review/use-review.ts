import { keepPreviousData, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { call } from '~/lib/client/api';
import { routes } from '~/lib/contracts';
import type { Finding, Series } from '~/lib/contracts/runs';
import type { TimeWindow } from '../strip/window';
import type { RunReviewProps } from './props';

/** Points asked for: about one a pixel of a wide strip. */
const POINTS = 1400;
/** A drag or a wheel changes the window many times a second; the server is asked once it rests. */
const REST_MS = 140;

/** The series for the window shown; while it is on its way, what is there already stays. */
export function useSeries(
  props: RunReviewProps,
  shown: TimeWindow,
  isZoomed: boolean,
): { series: Series; loading: boolean; failed: boolean } {
  const rested = useRested(isZoomed ? shown : null);
  const query = useQuery({
    queryKey: ['series', props.run.id, props.review.logId, rested?.fromS ?? null, rested?.toS ?? null],
    queryFn: ({ signal }) =>
      call(routes.review.series, {
        params: { id: props.run.id },
        query: { fromS: rested?.fromS, toS: rested?.toS, points: POINTS },
        signal,
      }),
    enabled: rested !== null,
    placeholderData: keepPreviousData,
  });
  const series = rested !== null && query.data ? query.data : props.series;
  return { series, loading: query.isFetching, failed: rested !== null && (query.isError || query.isPaused) };
}

function useRested<T>(value: T): T {
  const [rested, setRested] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setRested(value), REST_MS);
    return () => clearTimeout(timer);
  }, [value]);
  return rested;
}

type Change = { readonly finding: Finding } & Partial<Pick<Finding, 'state' | 'remark' | 'followUp'>>;
export type NewFinding = Pick<Finding, 'kind' | 'severity' | 'startS' | 'endS' | 'remark'>;

const byTime = (a: Finding, b: Finding): number => a.startS - b.startS || a.id.localeCompare(b.id);

/** The run's findings and what can be done to them. A failed change leaves what stood. */
export function useFindings(props: RunReviewProps) {
  const client = useQueryClient();
  const key = ['findings', props.run.id];
  const { data } = useQuery({
    queryKey: key,
    initialData: props.findings,
    staleTime: Infinity,
    queryFn: async () =>
      (await call(routes.findings.list, { params: { id: props.run.id }, query: { limit: 200 } })).items,
  });
  const replace = (changed: Finding): unknown =>
    client.setQueryData<Finding[]>(key, (before = []) =>
      [...before.filter((one) => one.id !== changed.id), changed].sort(byTime),
    );
  const decide = useMutation({
    mutationFn: ({ finding, ...body }: Change) =>
      call(routes.findings.update, {
        params: { id: props.run.id, findingId: finding.id },
        revision: finding.revision,
        body,
      }),
    onSuccess: replace,
    onError: () => client.invalidateQueries({ queryKey: key }),
  });
  const add = useMutation({
    mutationFn: (body: NewFinding) => call(routes.findings.create, { params: { id: props.run.id }, body }),
    onSuccess: replace,
  });
  return { findings: data, decide, add };
}
