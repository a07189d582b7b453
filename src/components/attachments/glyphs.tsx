import type { ReactElement, ReactNode } from 'react'

function Drawn({ size, children }: { size: number; children: ReactNode }): ReactElement {
  return (
    <svg
      aria-hidden
      focusable="false"
      viewBox="0 0 24 24"
      width={size}
      height={size}
      fill="none"
      stroke="currentColor"
      strokeWidth={1.6}
      className="shrink-0"
    >
      {children}
    </svg>
  )
}

/** A camera, in outline. */
export const CameraGlyph = ({ size = 24 }: { size?: number }): ReactElement => (
  <Drawn size={size}>
    <path d="M2.5 7h5L9 4.5h6L16.5 7h5v12.5h-19z" />
    <circle cx={12} cy={13} r={4} />
  </Drawn>
)

/** A sheet with a turned corner and lines: a document. */
export const DocumentGlyph = ({ size = 24 }: { size?: number }): ReactElement => (
  <Drawn size={size}>
    <path d="M5 2.5h9.5L19 7v14.5H5zM14.5 2.5V7H19" />
    <path d="M8 11.5h8M8 14.5h8M8 17.5h5" />
  </Drawn>
)

/** A framed view: a picture that is not to be seen here. */
export const PictureGlyph = ({ size = 24 }: { size?: number }): ReactElement => (
  <Drawn size={size}>
    <path d="M2.5 4.5h19v15h-19z" />
    <path d="m2.5 16 6-5.5 4.5 4 3-2.5 5.5 4.5" />
    <circle cx={16} cy={8.5} r={1.6} />
  </Drawn>
)
