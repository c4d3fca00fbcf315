import type { Site } from '#shared/api/places'
import type { FormField } from '../forms/fields'
import { options } from './fields'
import { stateOptions } from './words'

const identity: FormField[] = [
  { name: 'serial', label: 'Serial', type: 'text', mono: true, needed: true, help: 'As on its plate; capitals and small letters are the same.' },
  { name: 'channel', label: 'Channel', type: 'number', help: 'Only for a drive that moves several axes.' },
]
const further = (sites: readonly Site[], states: FormField): FormField[] => [
  { name: 'model', label: 'Model', type: 'text', mono: true, needed: true, help: 'The whole type code. Its nameplate is found by it.' },
  { name: 'firmware', label: 'Firmware', type: 'text', mono: true, empty: '' },
  { name: 'actuatorSerial', label: 'Serial of the actuator', type: 'text', mono: true, empty: '', help: 'Where drive and actuator are two.' },
  { name: 'actuatorModel', label: 'Model of the actuator', type: 'text', mono: true, empty: '' },
  states,
  { name: 'siteId', label: 'Site', type: 'choice', as: 'number', options: options(sites) },
  { name: 'location', label: 'Where it lies', type: 'text', empty: '', help: 'Store, shelf: where somebody finds it at night.' },
]

/** A unit becomes fitted by a fitting, never by hand. */
const state: FormField = { name: 'state', label: 'State', type: 'choice', options: stateOptions.filter(option => option.value !== 'fitted'), help: 'Left open: spare.' }

export const newUnitFields = (sites: readonly Site[]): FormField[] => [...identity, ...further(sites, state)]
export const unitFields = (sites: readonly Site[]): FormField[] => further(sites, { ...state, needed: true, options: stateOptions, help: 'Fitted follows from where it sits.' } as FormField)
