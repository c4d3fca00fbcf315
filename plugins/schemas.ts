import { config } from 'zod'

/*
 * The content policy allows no code made of text, which the schemas would try once at the start: the browser would report it
 * on every page. Has to be said before the first schema is made, hence the order.
 */
config({ jitless: true })

export default defineNuxtPlugin({ name: 'schemas', order: -50 })
