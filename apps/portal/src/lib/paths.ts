/** Addresses of the portal's pages. A feature's own pages add their line here. */
export const paths = {
  home: '/',
  signIn: '/sign-in',
  forgotten: '/forgotten-password',
  invitation: (token: string) => `/invitation/${encodeURIComponent(token)}`,
  passwordReset: (token: string) => `/password-reset/${encodeURIComponent(token)}`,
  account: '/account',
  worklist: '/worklist',
  reviewDesk: '/review-desk',
  buyingStatus: '/buying-status',
  buyingLine: (id: string) => `/buying-status/${id}`,
  people: '/people',
  suppliers: '/suppliers',
  audit: '/audit',
  parts: '/parts',
  part: (id: string) => `/parts/${id}`,
  revision: (partId: string, revisionId: string) => `/parts/${partId}/revisions/${revisionId}`,
  comparison: (partId: string, revisionId: string, withId: string) =>
    `/parts/${partId}/revisions/${revisionId}/comparison?with=${withId}`,
  characteristicImport: (partId: string, revisionId: string) =>
    `/parts/${partId}/revisions/${revisionId}/import`,
  requests: '/requests',
  newRequest: '/requests/new',
  request: (id: string) => `/requests/${id}`,
  submission: (id: string) => `/submissions/${id}`,
  measurements: (id: string) => `/submissions/${id}/measurements`,
  readingImport: (id: string) => `/submissions/${id}/import`,
  deviations: (id: string) => `/submissions/${id}/deviations`,
  evidence: (id: string) => `/submissions/${id}/evidence`,
  check: (id: string) => `/submissions/${id}/check`,
  warrant: (id: string) => `/submissions/${id}/warrant`,
  review: (id: string) => `/submissions/${id}/review`,
  disposition: (id: string) => `/submissions/${id}/disposition`,
  gauges: '/gauges',
} as const;

/** Only an address inside the portal may be returned to after sign-in. */
export function safeReturnPath(wanted: string | null): string {
  if (wanted === null || !/^\/(?![/\\])/.test(wanted)) return paths.home;
  const resolved = new URL(wanted, 'https://portal.invalid');
  if (resolved.host !== 'portal.invalid' || resolved.pathname === paths.signIn) return paths.home;
  return resolved.pathname + resolved.search + resolved.hash;
}
