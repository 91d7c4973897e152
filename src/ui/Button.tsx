import type { AnchorHTMLAttributes, ButtonHTMLAttributes } from 'react'
import { Link, type LinkProps } from 'react-router-dom'

type Look = 'plain' | 'main' | 'breach' | 'quiet'
type Size = 'desk' | 'glove' | 'act'

const looks: Record<Look, string> = {
  plain: 'px-3 border-ink text-ink bg-panel hover:bg-face',
  main: 'px-3 border-select bg-select text-on-select hover:underline',
  breach: 'px-3 border-breach text-breach bg-panel hover:bg-face',
  quiet: 'border-transparent text-select underline underline-offset-2 hover:bg-face',
}
const sizes: Record<Size, string> = {
  desk: 'min-h-8 max-sm:min-h-11',
  glove: 'min-h-glove text-large',
  act: 'min-h-act text-large font-medium',
}

/** The look of a button; for links and labels that act as one. */
export function buttonClass(look: Look = 'plain', size: Size = 'desk'): string {
  return `inline-flex items-center justify-center gap-2 border text-center cursor-pointer select-none ${looks[look]} ${sizes[size]} disabled:opacity-50 disabled:cursor-not-allowed disabled:no-underline`
}

interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  readonly look?: Look
  readonly size?: Size
  /** Says what is under way instead of the label, and takes no further press. */
  readonly busy?: string | false
}

export function Button({
  look,
  size,
  busy = false,
  type = 'button',
  className = '',
  disabled,
  children,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      disabled={disabled === true || busy !== false}
      aria-busy={busy !== false}
      className={`${buttonClass(look, size)} ${className}`}
    >
      {busy === false ? children : busy}
    </button>
  )
}

interface Looks {
  readonly look?: Look
  readonly size?: Size
}

export function ButtonLink({ look, size, className = '', ...rest }: LinkProps & Looks) {
  return <Link {...rest} className={`${buttonClass(look, size)} ${className}`} />
}

/** A link to a file that the server gives, or to another place outside the router. */
export function ButtonAnchor({
  look,
  size,
  className = '',
  children,
  ...rest
}: AnchorHTMLAttributes<HTMLAnchorElement> & Looks) {
  return (
    <a {...rest} className={`${buttonClass(look, size)} ${className}`}>
      {children}
    </a>
  )
}
