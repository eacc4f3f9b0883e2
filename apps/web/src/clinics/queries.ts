import type { Answer } from '@marram/contract'
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
export const cardQuery = (academy: string, clinicId: string) =>
  routeQuery('register.card', { academy, params: { clinicId } })
