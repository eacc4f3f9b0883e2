import { keepPreviousData, queryOptions, skipToken } from '@tanstack/react-query'
import type { Answer, Sent } from '@marram/contract'
import { call } from '../api/client'
import { routeQuery } from '../api/query'

export type AcademyPage = Answer<'page.read'>
export type PageClinic = AcademyPage['clinics'][number]
export type ClinicPage = Answer<'page.clinic'>
export type AcademyFace = AcademyPage['academy']
export type Clinic = Answer<'clinics.read'>
export type ClinicInList = Answer<'clinics.list'>['clinics'][number]
export type Session = Clinic['sessions'][number]

export const academyPageQuery = (academy: string) => routeQuery('page.read', { academy })
export const clinicPageQuery = (academy: string, clinic: string) =>
  routeQuery('page.clinic', { academy, params: { clinic } })
export const clinicsQuery = (academy: string) => routeQuery('clinics.list', { academy })
export const clinicQuery = (academy: string, clinicId: string) =>
  routeQuery('clinics.read', { academy, params: { clinicId } })
export const boardQuery = (academy: string, from: string, to: string) =>
  routeQuery('sessions.list', { academy, query: { from, to } })

/** The dates of a clinic while it is being written; nothing is asked while a word is missing. */
export const previewQuery = (academy: string, body: Sent<'clinics.preview', 'body'> | null) =>
  queryOptions({
    queryKey: [academy, 'clinics.preview', JSON.stringify(body)],
    queryFn: body ? ({ signal }) => call('clinics.preview', { academy, body, signal }) : skipToken,
    placeholderData: keepPreviousData,
    retry: false,
  })
