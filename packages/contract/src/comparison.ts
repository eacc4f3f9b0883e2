import { z } from 'zod'
import { swingView, targetView } from './swings'

/** What is worked out is never one number. */
const range = z.object({ least: z.number(), most: z.number() })

const face = z.object({
  /** Open to the target is positive, for the golfer's own hand. */
  openDeg: z.number(),
  loftDeg: z.number(),
})
const faceCases = z.object({ forearmFixed: face, leanHeld: face })

/** Over the bounding cases of the face and both ball models; right of the target is positive. */
const flight = z.object({
  startDeg: range,
  curveMetres: range,
  sideMetres: range,
  carryMetres: range,
  apexMetres: range,
  seconds: range,
  landingDeg: range,
  /** A ball that never rises carries nothing: then the ranges begin there. */
  rises: z.enum(['always', 'sometimes', 'never']),
})

const matchUp = z.object({
  extensionOutDeg: z.number(),
  radialBackDeg: z.number(),
  isExtensionOut: z.boolean(),
  isRadialBack: z.boolean(),
})

export const comparisonView = z.object({
  /** The earlier of two swings, or the target. */
  from: z.discriminatedUnion('kind', [
    z.object({ kind: z.literal('swing'), swing: swingView }),
    z.object({ kind: z.literal('target'), target: targetView }),
  ]),
  /** The later of two swings, or the one that is held against its target. */
  to: swingView,
  /** By how much they differ at address, and by how much they may. */
  address: z.object({
    flexionDeg: z.number().nullable(),
    ulnarDeg: z.number().nullable(),
    toleranceDeg: z.number(),
  }),
  isComparable: z.boolean(),
  whyNot: z.array(z.enum(['address', 'club'])),
  /** Angle by angle, `to` less `from`; null where they are not comparable. */
  differences: z
    .array(
      z.object({
        position: z.enum(['address', 'top', 'impact']),
        axis: z.enum(['flexion', 'ulnar']),
        differenceDeg: z.number(),
        /** Smaller differences are within what measuring does by itself. */
        leastDeg: z.number(),
        isChange: z.boolean(),
        by: z.enum(['measuring', 'spread']),
      }),
    )
    .nullable(),
  /** Null for a target that does not say enough. */
  matchUp: z.object({ from: matchUp.nullable(), to: matchUp }),
  /** Null where they are not comparable, or the target says nothing of impact. */
  workedOut: z
    .object({
      /** Whose face was measured, and the other's worked out from it; `square` where none was. */
      anchoredTo: z.enum(['from', 'to', 'square']),
      /** What nobody measured in either, and is taken as usual for the club. */
      assumed: z.array(z.enum(['path', 'attack', 'speed'])),
      face: z.object({ from: faceCases, to: faceCases }),
      flight: z.object({ from: flight, to: flight }),
    })
    .nullable(),
})
