import { FaultSummaryDto, TurnaroundDto, TurnaroundQuery } from '../turnaround';
import { OWNER, STAFF, route } from '../route';

export const getTurnaround = route({
  id: 'getTurnaround',
  method: 'get',
  path: '/api/turnaround',
  access: OWNER,
  summary: 'How long members wait and whether the promise was kept',
  query: TurnaroundQuery,
  answer: TurnaroundDto,
});
export const getTurnaroundCsv = route({
  id: 'getTurnaroundCsv',
  method: 'get',
  path: '/api/turnaround.csv',
  access: OWNER,
  summary: 'The takes behind the figures',
  query: TurnaroundQuery,
  produces: 'csv',
  status: 200,
});
export const getFaultSummary = route({
  id: 'getFaultSummary',
  method: 'get',
  path: '/api/faults/summary',
  access: STAFF,
  summary: 'How common each fault is, by lift',
  answer: FaultSummaryDto,
});
