import type { Answer } from './answers';

/** A problem document as the service writes them. */
export function problem(status: number, type: string, detail: string, extra: object = {}): Answer {
  const instance = 'urn:noaa:nws:api:request:00000000-0000-4000-8000-000000000000';
  const body = {
    correlationId: '0',
    title: type,
    type: `https://api.weather.gov/problems/${type}`,
    status,
    detail,
    instance,
    ...extra,
  };
  return { status, type: 'application/problem+json', body: JSON.stringify(body), headers: {} };
}
