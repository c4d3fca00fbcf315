export { cautions, cautionSources } from '#shared/settings/cautions'
