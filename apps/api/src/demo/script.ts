import type { Parsed } from '@marram/contract'

/** What a demo academy is made of, before a season is played through it. */
export interface AcademyScript {
  seed: number
  open: Parsed<'academies.open', 'body'>
  settings: Parsed<'academies.change', 'body'>
  staff: { name: string; email: string; role: 'owner' | 'desk' | 'bookkeeper' }[]
  coaches: { name: string; email: string; about: string }[]
  venues: (Parsed<'venues.add', 'body'> & { areas: Parsed<'areas.add', 'body'>[] })[]
  golfers: number
  mailDomain: string
  clinics: ClinicScript[]
}

export interface ClinicScript {
  title: string
  summary: string
  about: string
  bring: string
  /** Weeks from this week to the first session; negative is behind us. */
  startsInWeeks: number
  /** Monday is 1. */
  weekday: number
  at: string
  minutes: number
  sessions: number
  coach: string
  area: string
  fromUnit?: number
  toUnit?: number
  capacity: number
  /** Share of the places that are taken. */
  filled: number
  waiting?: number
  runPriceMinor?: number
  dropInPriceMinor?: number
  payMode?: 'card' | 'desk' | 'free'
  ages?: [from: number, to: number]
  handicaps?: [from: number | null, to: number | null]
  /** Sessions called off for weather, by number. */
  calledOff?: { number: number; reason: string }[]
  /** How many golfers gave their place up after paying. */
  givenUp?: number
  isDraft?: boolean
}
