import { HttpClient, HttpEvent, HttpEventType } from '@angular/common/http';
import { EMPTY, Observable, concatMap, of } from 'rxjs';

/** Bytes on their way, then what the service made of them. Unsubscribing cancels the upload. */
export type Upload<Answer> =
  | { readonly state: 'sending'; readonly sent: number; readonly total: number }
  | { readonly state: 'done'; readonly answer: Answer };

export function upload<Answer>(http: HttpClient, url: string, form: FormData): Observable<Upload<Answer>> {
  return http
    .post<Answer>(url, form, { reportProgress: true, observe: 'events' })
    .pipe(concatMap((event: HttpEvent<Answer>) => uploadOf(event)));
}

function uploadOf<Answer>(event: HttpEvent<Answer>): Observable<Upload<Answer>> {
  if (event.type === HttpEventType.UploadProgress)
    return of({ state: 'sending', sent: event.loaded, total: event.total ?? 0 });
  if (event.type === HttpEventType.Response && event.body !== null) return of({ state: 'done', answer: event.body });
  return EMPTY;
}
