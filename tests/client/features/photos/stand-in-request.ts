/** A request that a test answers, in place of the browser’s XMLHttpRequest. */
export class StandInRequest extends EventTarget {
  static last: StandInRequest;
  readonly upload = new EventTarget();
  status = 0;
  responseText = '';
  opened: readonly string[] = [];
  body: FormData | null = null;
  readonly headers = new Map<string, string>();
  constructor() {
    super();
    StandInRequest.last = this;
  }
  open(method: string, address: string): void {
    this.opened = [method, address];
  }
  setRequestHeader(): void {}
  getResponseHeader(name: string): string | null {
    return this.headers.get(name) ?? null;
  }
  send(body: FormData): void {
    this.body = body;
  }
  abort(): void {
    this.dispatchEvent(new Event('abort'));
  }
  progress(loaded: number): void {
    this.upload.dispatchEvent(new ProgressEvent('progress', { loaded }));
  }
  answer(status: number, body: unknown): void {
    this.status = status;
    this.responseText = typeof body === 'string' ? body : JSON.stringify(body);
    this.dispatchEvent(new Event('load'));
  }
}
