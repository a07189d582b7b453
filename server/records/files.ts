/** A photo as it is put into a workbook. */
export interface RecordPicture {
  jpeg: Buffer
  /** px. */
  width: number
  height: number
}

/** What is known of the photos and documents that a record's ledger names, by their SHA-256. */
export interface RecordFiles {
  present: ReadonlySet<string>
  /** Those whose bytes are no longer the ones that were kept. */
  altered: ReadonlySet<string>
  pictures: ReadonlyMap<string, RecordPicture>
}

/** For a record that is written out where no files are. */
export const NO_FILES: RecordFiles = { present: new Set(), altered: new Set(), pictures: new Map() }

/** So many photos stand in a workbook as pictures, so that it still opens; the others are named in it. */
export const MOST_PICTURES = 60
/** On paper, where each takes a third of a page's width. */
export const MOST_ON_PAPER = 24

/** px of the longer side of a picture in a workbook. */
export const PICTURE_LONGEST = 800
