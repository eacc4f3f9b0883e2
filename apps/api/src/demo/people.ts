/** People of the invented academies who may be tried out at sign-in; their password is shown there. */
export const DEMO_PASSWORD = 'marram and dunes'

export interface DemoPerson {
  name: string
  email: string
  /** What they do: "Owner and head coach". */
  what: string
  academy: string
}

export const DEMO_PEOPLE: readonly DemoPerson[] = [
  {
    name: 'Aoife Kerrane',
    email: 'aoife@kittiwake.example',
    what: 'Owner and head coach',
    academy: 'Kittiwake Links Academy',
  },
  {
    name: 'Nuala Brogan',
    email: 'nuala@kittiwake.example',
    what: 'Front desk',
    academy: 'Kittiwake Links Academy',
  },
  {
    name: 'Ruairí Deasy',
    email: 'ruairi@kittiwake.example',
    what: 'Coach',
    academy: 'Kittiwake Links Academy',
  },
  {
    name: 'Priya Nandakumar',
    email: 'priya@golfer.example',
    what: 'Golfer and guardian of two',
    academy: 'Kittiwake Links Academy',
  },
  {
    name: 'Piotr Halloran',
    email: 'piotr@books.example',
    what: 'Bookkeeper',
    academy: 'Kittiwake Links Academy',
  },
  {
    name: 'Dana Whitlock',
    email: 'dana@juniperflats.example',
    what: 'Owner',
    academy: 'Juniper Flats Golf School',
  },
]
