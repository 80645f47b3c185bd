import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import type { BringInRequest, IncomingFile, ReadingChoices, ReadingProposal, RecordTask } from './contract';
import { queryOf } from './page';
import { Upload, upload } from './upload';

/** Files that have arrived and do not count yet. */
@Injectable({ providedIn: 'root' })
export class IncomingFilesClient {
  private readonly http = inject(HttpClient);

  /** Unsubscribe to cancel. */
  send(file: File): Observable<Upload<IncomingFile>> {
    const form = new FormData();
    form.append('file', file);
    return upload<IncomingFile>(this.http, '/api/incoming-files', form);
  }

  read(id: string): Observable<IncomingFile> {
    return this.http.get<IncomingFile>(`/api/incoming-files/${id}`);
  }

  /** How the file would be read. With `appendTo`, the kinds and units of that revision hold. */
  propose(id: string, choices: ReadingChoices, appendTo?: string): Observable<ReadingProposal> {
    const params = queryOf({ appendTo });
    return this.http.post<ReadingProposal>(`/api/incoming-files/${id}/proposal`, choices, { params });
  }

  /** Answers with the task that does the work. */
  bringIn(id: string, request: BringInRequest): Observable<RecordTask> {
    return this.http.post<RecordTask>(`/api/incoming-files/${id}/bring-in`, request);
  }

  discard(id: string): Observable<void> {
    return this.http.delete<void>(`/api/incoming-files/${id}`);
  }
}
