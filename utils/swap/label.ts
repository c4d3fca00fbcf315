/*
 * The one part of the Barcode Detection interface (WICG, Accelerated Shape Detection) that is used here. Not every browser
 * has it; where it is missing three characters of the tag do.
 */
interface Detector { detect: (from: HTMLVideoElement) => Promise<readonly { readonly rawValue: string }[]> }
interface DetectorMaker { new (options: { formats: readonly string[] }): Detector, getSupportedFormats: () => Promise<readonly string[]> }

const maker = () => (globalThis as { BarcodeDetector?: DetectorMaker }).BarcodeDetector

/** A reader of QR codes, or undefined where this browser has none or no camera may be asked for (plain http off this device). */
export async function labelReader(): Promise<Detector | undefined> {
  const Maker = maker()
  if (!Maker || !('mediaDevices' in navigator)) return undefined
  const formats = await Maker.getSupportedFormats()
  return formats.includes('qr_code') ? new Maker({ formats: ['qr_code'] }) : undefined
}

const tagForm = /^[A-Za-z0-9._-]{1,32}$/

/** The swap that a restore sheet leads to; undefined for every other code. */
export function swapOfCode(text: string): number | undefined {
  const [, id] = /\/swaps\/([1-9]\d{0,14})\/?(?:[?#].*)?$/.exec(text.trim()) ?? []
  return id === undefined ? undefined : Number(id)
}

/** The tag that a label carries: the end of the address of its axis, or the bare tag; undefined where it is no label of ours. */
export function tagOfLabel(text: string): string | undefined {
  const [, inAddress] = /\/axes\/([^/?#]+)\/?(?:[?#].*)?$/.exec(text.trim()) ?? []
  const tag = inAddress === undefined ? text.trim() : decoded(inAddress)
  return tagForm.test(tag) ? tag : undefined
}

/** An address with a broken percent sign names no axis. */
function decoded(part: string): string {
  try {
    return decodeURIComponent(part)
  }
  catch {
    return ''
  }
}
