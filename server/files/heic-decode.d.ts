/** The part of the package that is used here; it brings no types of its own. */
declare module 'heic-decode' {
  type Decoded = { readonly width: number; readonly height: number; readonly data: Uint8ClampedArray<ArrayBuffer> };
  type Pictures = readonly { readonly width: number; readonly height: number; readonly decode: () => Promise<Decoded> }[] & { readonly dispose: () => void };

  /** Every top-level picture of a file, its first the one that is meant; pixels only when asked for. */
  export function all(input: { readonly buffer: Uint8Array }): Promise<Pictures>;
}
