import { first } from './0001-first'
import { second } from './0002-waivers'
import { lettersStep } from './0003-letters'
import { controllerScanStep } from './0004-controller-scan'
import { papersStep } from './0005-papers'
import { findingsStep } from './0006-findings'
import { swapsStep } from './0007-swaps'
import { trailStep } from './0008-trail'
import { historyStep } from './0009-history'
import { spareFitStep } from './0010-spare-fit'
import { reportsStep } from './0011-reports'

export interface Migration { readonly number: number, readonly name: string, readonly sql: string }

const steps: readonly Omit<Migration, 'number'>[] = [
  first,
  second,
  lettersStep,
  controllerScanStep,
  papersStep,
  findingsStep,
  swapsStep,
  trailStep,
  historyStep,
  spareFitStep,
  reportsStep,
]

/** In order, numbered without gaps from 1. Text, not files, so that they reach the built server and the tests alike. */
export const migrations: readonly Migration[] = steps.map((step, i) => ({ ...step, number: i + 1 }))
