import type { Logger } from 'pino'
import type { Vault } from '#server/database/client'
import type { Post } from '#server/mail/post'

/** What the start-up made and every request needs; set by the plugin, read by the route wrapper alone. */
export interface ServerContext {
  readonly vault: Vault
  readonly logger: Logger
  /** Seals cookies and stored answers; never leaves the process. */
  readonly secret: string
  /** Where people reach the vault, from PUBLIC_URL; null = wherever the request says. */
  readonly publicOrigin: string | null
  /** The way that letters leave by. */
  readonly post: Post
}

declare module 'h3' {
  interface H3EventContext { server: ServerContext }
}
