import type { ReactiveController, ReactiveControllerHost } from 'lit';

const hasFiles = (event: DragEvent): boolean => event.dataTransfer?.types.includes('Files') ?? false;

/** Takes files that are dropped anywhere on the page; `over` says whether one hangs above it. */
export class FileDrop implements ReactiveController {
  over = false;
  readonly #host: ReactiveControllerHost;
  readonly #take: (file: File) => void;
  // Enter and leave arrive for every element on the way.
  #depth = 0;

  constructor(host: ReactiveControllerHost, take: (file: File) => void) {
    this.#host = host;
    this.#take = take;
    host.addController(this);
  }

  hostConnected(): void {
    for (const [type, listen] of this.#listeners) addEventListener(type, listen as EventListener);
  }
  hostDisconnected(): void {
    for (const [type, listen] of this.#listeners) removeEventListener(type, listen as EventListener);
  }

  #set(depth: number): void {
    this.#depth = depth;
    if (this.over === depth > 0) return;
    this.over = depth > 0;
    this.#host.requestUpdate();
  }

  readonly #listeners: readonly [string, (event: DragEvent) => void][] = [
    ['dragenter', (event) => hasFiles(event) && this.#set(this.#depth + 1)],
    ['dragleave', (event) => hasFiles(event) && this.#set(Math.max(this.#depth - 1, 0))],
    ['dragover', (event) => hasFiles(event) && event.preventDefault()],
    [
      'drop',
      (event) => {
        if (!hasFiles(event)) return;
        // Otherwise the browser leaves the page and shows the file's bytes.
        event.preventDefault();
        this.#set(0);
        const [file] = event.dataTransfer!.files;
        if (file) this.#take(file);
      },
    ],
  ];
}
