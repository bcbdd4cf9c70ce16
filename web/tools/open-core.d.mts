export interface OpenCore {
  answer(request: string): string;
  schema(): string;
  version(): string;
}

export function openCore(folder: string, kind: 'module' | 'plain'): Promise<OpenCore>;
