const UNDER_WAY = ['queued', 'running'] as const;
type UnderWay = (typeof UNDER_WAY)[number];

/** No result yet, and one may still come. */
export const isUnderWay = <R extends { readonly state: string }>(run: R | null | undefined): run is R & { readonly state: UnderWay } =>
  UNDER_WAY.some((state) => state === run?.state);
