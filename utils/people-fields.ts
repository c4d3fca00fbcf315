import { roles, type Role } from '#shared/api/common'
import type { FormField, Option } from './forms/fields'

export const roleWords: Readonly<Record<Role, string>> = {
  technician: 'technician: uploads, works through the tray', planner: 'planner: registers, marks known-good',
  auditor: 'auditor: reads, closes findings', admin: 'administrator: people, tokens, copies',
}
const roleOptions: Option[] = roles.map(role => ({ value: role, label: roleWords[role] }))

const passwordField: FormField = { name: 'password', label: 'A new password', type: 'password', help: 'At least 15 characters. Works at once and ends their sessions.' }
export const personFields = (sites: readonly Option[]): FormField[] => [
  { name: 'name', label: 'Name', type: 'text', needed: true, help: 'As it stands beside all they do; it stays when they leave.' },
  { name: 'email', label: 'E-mail', type: 'text', needed: true },
  { name: 'roles', label: 'Roles', type: 'many', options: roleOptions, needed: true },
  { name: 'siteIds', label: 'Sites', type: 'many', as: 'number', options: sites, help: 'None ticked: all sites.' },
  { name: 'shared', label: 'An account that several share', type: 'flag', help: 'May upload, never sign.' },
  passwordField,
]

const scopeOptions: Option[] = [{ value: 'upload', label: 'upload files' }, { value: 'read', label: 'read everything of its sites' }]
export const tokenFields = (sites: readonly Option[], people: readonly Option[], zone: string, zoneWord: string): FormField[] => [
  { name: 'name', label: 'Name', type: 'text', needed: true, example: 'station 2, nightly', help: 'Stands beside every upload that it sends.' },
  { name: 'scopes', label: 'It may', type: 'many', options: scopeOptions, needed: true },
  { name: 'siteIds', label: 'Sites', type: 'many', as: 'number', options: sites, help: 'None ticked: all sites of its owner.' },
  { name: 'endsAt', label: `Ends, ${zoneWord}`, type: 'time', zone, needed: true, help: 'Within a year.' },
  { name: 'ownerId', label: 'Who answers for it', type: 'choice', as: 'number', options: people, help: 'Left open: you. It ends when they leave.' },
]
