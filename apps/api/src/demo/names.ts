/** First and family names that the demo's golfers are put together from. All are invented people. */
export const FIRST_NAMES = [
  ...['Eamon', 'Bea', 'Tom', 'Oisín', 'Sorcha', 'Łukasz', 'Orla', 'Fergal', 'Ines', 'Tadhg'],
  ...[
    'Maren',
    'Conor',
    'Priscilla',
    'Anselm',
    'Dervla',
    'Hugo',
    'Ailbhe',
    'Kasia',
    'Ronan',
    'Thea',
  ],
  ...['Bram', 'Síle', 'Otis', 'Greta', 'Malachy', 'Vera', 'Cillian', 'Juno', 'Bartek', 'Nell'],
]

export const FAMILY_NAMES = [
  ...['Crilly', 'Farrant', 'Garvey', 'Halpin', 'Ní Bhraonáin', 'Żbik', 'Devane', 'Odell', 'Quirke'],
  ...['Maslow', 'Tierney', 'Vandeleur', 'Hollick', 'Prendeville', 'Szulc', 'Rafter', 'Lomasney'],
  ...['Birchall', 'Kinnane', 'Ferriter', 'Ostrow', 'Delahunt', 'Marchetti', 'Scanlan', 'Weir'],
]

export const WESTERN_FAMILY_NAMES = [
  ...['Halvorsen', 'Tso', 'Meadows', 'Ybarra', 'Castellano', 'Whitcomb', 'Oyelaran', 'Lindqvist'],
  ...['Barrow', 'Nakagawa', 'Petrossian', 'Sandoval', 'Trask', 'Vigil', 'Winslow', 'Abeyta'],
]

export const CHILD_NAMES = ['Rian', 'Saoirse', 'Milo', 'Freya', 'Lorcan', 'Zofia', 'Ivo', 'Clodagh']
