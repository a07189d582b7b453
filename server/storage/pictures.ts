import sharp from 'sharp'

/** A photo is made smaller before it is sent; a picture with more points than this is none, and would fill the memory. */
const MOST_PIXELS = 50_000_000
const LONGEST_SECONDS = 10

export interface Picture {
  jpeg: Buffer
  /** px. */
  width: number
  height: number
}

/**
 * A photo as an upright JPEG whose longer side has at most `longest` px, never larger than it was, without what the
 * camera wrote into it. null when the bytes can't be shown as a picture.
 */
export async function smallerPicture(bytes: Buffer, longest: number): Promise<Picture | null> {
  try {
    const { data, info } = await sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'error' })
      .timeout({ seconds: LONGEST_SECONDS })
      .rotate()
      .resize({ width: longest, height: longest, fit: 'inside', withoutEnlargement: true })
      .flatten({ background: '#ffffff' })
      .jpeg({ quality: 80 })
      .toBuffer({ resolveWithObject: true })
    return { jpeg: data, width: info.width, height: info.height }
  } catch {
    // Broken, too large, or none at all: sharp says so by its own words, which help nobody here.
    return null
  }
}
