import { ApiProblem } from '../api/problem'

/** Degrees as they are typed, north and east positive. Throws the sentence that says what is wrong. */
export function readPosition(wanted: { latitude: string; longitude: string }) {
  const latitudeDeg = readDegrees(wanted.latitude)
  const longitudeDeg = readDegrees(wanted.longitude)
  if (latitudeDeg !== null && longitudeDeg !== null) return { latitudeDeg, longitudeDeg }
  const sentence = 'Degrees as a number, like 53.8512.'
  throw new ApiProblem({
    code: 'invalid-fields',
    status: 422,
    detail: 'Sunset needs the place in degrees.',
    fields: {
      ...(latitudeDeg === null ? { latitudeDeg: sentence } : {}),
      ...(longitudeDeg === null ? { longitudeDeg: sentence } : {}),
    },
  })
}

function readDegrees(text: string): number | null {
  const degrees = Number(text.replace(',', '.').trim())
  return text.trim() === '' || !Number.isFinite(degrees) ? null : degrees
}
