// The few globals that a browser worker and Node share. What is not declared here (fetch, document, console ...) does not compile in the core.
interface PlatformTextDecoder {
  decode(input?: ArrayBufferView | ArrayBuffer, options?: { stream?: boolean }): string;
  readonly encoding: string;
}
declare const TextDecoder: { new (label?: string, options?: { fatal?: boolean; ignoreBOM?: boolean }): PlatformTextDecoder };
declare const TextEncoder: { new (): { encode(input: string): Uint8Array<ArrayBuffer> } };
interface AbortSignal {
  readonly aborted: boolean;
  throwIfAborted(): void;
}
interface PlatformStreamReader {
  read(): Promise<{ done: boolean; value?: Uint8Array }>;
  cancel(): Promise<void>;
}
interface PlatformReadable {
  getReader(): PlatformStreamReader;
}
interface PlatformWriter {
  write(chunk: Uint8Array): Promise<void>;
  close(): Promise<void>;
  abort(): Promise<void>;
}
declare const DecompressionStream: {
  new (format: 'gzip' | 'deflate' | 'deflate-raw'): { readable: PlatformReadable; writable: { getWriter(): PlatformWriter } };
};
declare const crypto: { subtle: { digest(algorithm: string, bytes: Uint8Array): Promise<ArrayBuffer> } };
declare function setTimeout(run: () => void, ms: number): unknown;
declare const performance: { now(): number };
interface Blob {
  readonly size: number;
}
