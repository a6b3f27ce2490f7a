/** What a replaced or abandoned calculation rejects with. */
export const superseded = () => Object.assign(new Error('A newer request replaced this one.'), { name: 'Superseded' })

/** Whether an error only says that a calculation was replaced or abandoned; hosts answer it with the code `cancelled`. */
export const isSuperseded = (error: unknown): boolean => error instanceof Error && error.name === 'Superseded'
