import { first } from './0001-first'
import { second } from './0002-waivers'
import { third } from './0003-letters'

export interface Migration { readonly number: number, readonly name: string, readonly sql: string }

/** In order, numbered without gaps from 1. Text, not files, so that they reach the built server and the tests alike. */
export const migrations: readonly Migration[] = [first, second, third]
