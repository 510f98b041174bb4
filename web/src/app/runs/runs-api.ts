import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type {
  CoordinatorSummary,
  Parcel,
  Proposal,
  Run,
  RunNew,
  RunPatch,
  RunPreview,
} from '@shared/contract';
import { onVersion } from '../ui/save-state';

/** One parcel's tracking number, as it is written down at the counter. */
export interface TrackingEntry {
  readonly parcelId: number;
  readonly number: string;
}

/** The calls of the runs pages. Every change of a run sends the version it was made on. */
@Injectable({ providedIn: 'root' })
export class RunsApi {
  private readonly http = inject(HttpClient);

  /** Runs of a window of days; both ends count. */
  list(from: string, to: string): Observable<Run[]> {
    return this.http.get<Run[]>('/api/runs', { params: { from, to } });
  }

  get(id: number): Observable<Run> {
    return this.http.get<Run>(`/api/runs/${id}`);
  }

  /** The parcels that wait for a run or for a day. */
  waitingParcels(): Observable<Parcel[]> {
    return this.http.get<Parcel[]>('/api/parcels', { params: { state: 'seeking,booked,packed,on-hold' } });
  }

  drivers(): Observable<CoordinatorSummary[]> {
    return this.http.get<CoordinatorSummary[]>('/api/coordinators');
  }

  propose(): Observable<Proposal> {
    return this.http.post<Proposal>('/api/runs/proposals', {});
  }

  create(body: RunNew): Observable<Run> {
    return this.http.post<Run>('/api/runs', body);
  }

  preview(run: Run, patch: RunPatch): Observable<RunPreview> {
    return this.http.post<RunPreview>(`/api/runs/${run.id}/preview`, patch);
  }

  change(run: Run, patch: RunPatch): Observable<Run> {
    return this.http.patch<Run>(`/api/runs/${run.id}`, patch, onVersion(run));
  }

  confirm(run: Run): Observable<Run> {
    return this.http.post<Run>(`/api/runs/${run.id}/confirmation`, {}, onVersion(run));
  }

  depart(run: Run, aboardParcelIds: readonly number[]): Observable<Run> {
    return this.http.post<Run>(`/api/runs/${run.id}/departure`, { aboardParcelIds }, onVersion(run));
  }

  handOver(run: Run, tracking: readonly TrackingEntry[]): Observable<Run> {
    return this.http.post<Run>(`/api/runs/${run.id}/hand-over`, { tracking }, onVersion(run));
  }

  callOff(run: Run, reason: string): Observable<Run> {
    return this.http.post<Run>(`/api/runs/${run.id}/call-off`, { reason }, onVersion(run));
  }
}
