import type { Answer, Parsed } from '@marram/contract'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { STARTING_SETTINGS, type Settings } from './defaults'
import type { CoachingSettings } from './models'
import { changeSettings, findSettings } from './queries'

type Change = Parsed<'coaching-settings.change', 'body'>

/** How this academy reads swings. */
export async function settingsOf(trx: AcademyTrx): Promise<Settings> {
  const row = await findSettings(trx)
  if (!row) return STARTING_SETTINGS
  return {
    toleranceDeg: row.toleranceDeg,
    errorDeg: {
      sensor: row.sensorErrorDeg,
      camera: row.cameraErrorDeg,
      goniometer: row.goniometerErrorDeg,
      eye: row.eyeErrorDeg,
    },
    matchUp: { extensionOutDeg: row.extensionOutDeg, radialBackDeg: row.radialBackDeg },
  }
}

export function readCoachingSettings(
  { db }: Services,
  academyId: string,
): Promise<Answer<'coaching-settings.read'>> {
  return inAcademy(db, academyId, settingsOf, { readOnly: true })
}

/** Changes what is given and leaves the rest. Swings keep the error they were recorded with. */
export function changeCoachingSettings(
  { db, clock }: Services,
  wanted: { academyId: string; accountId: string; change: Change },
): Promise<Answer<'coaching-settings.change'>> {
  const { academyId, accountId: changedBy, change } = wanted
  return inAcademy(db, academyId, async (trx) => {
    const columns = columnsOf(change)
    if (Object.keys(columns).length > 0) {
      await changeSettings(trx, {
        start: columnsOf(STARTING_SETTINGS),
        change: { ...columns, changedBy, changedAt: clock.now() },
      })
    }
    return settingsOf(trx)
  })
}

/** The columns of what is given, and of nothing else. */
function columnsOf({ toleranceDeg, errorDeg = {}, matchUp = {} }: Change) {
  const columns: { [Column in keyof CoachingSettings]?: number | undefined } = {
    toleranceDeg,
    sensorErrorDeg: errorDeg.sensor,
    cameraErrorDeg: errorDeg.camera,
    goniometerErrorDeg: errorDeg.goniometer,
    eyeErrorDeg: errorDeg.eye,
    extensionOutDeg: matchUp.extensionOutDeg,
    radialBackDeg: matchUp.radialBackDeg,
  }
  const given = Object.entries(columns).filter(([, value]) => value !== undefined)
  // Names and figures are those just written; what was taken out are the missing ones.
  return Object.fromEntries(given) as Partial<CoachingSettings>
}
