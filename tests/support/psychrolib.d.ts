/** The package carries no types: only what the tests use as an oracle is declared. Humidity is a fraction there. */
declare module 'psychrolib' {
  const psychrolib: {
    SI: number
    SetUnitSystem: (unitSystem: number) => void
    GetSatVapPres: (temperatureC: number) => number
    GetVapPresFromRelHum: (temperatureC: number, humidity: number) => number
    GetTDewPointFromRelHum: (temperatureC: number, humidity: number) => number
    GetHumRatioFromRelHum: (temperatureC: number, humidity: number, pressurePa: number) => number
    GetTWetBulbFromRelHum: (temperatureC: number, humidity: number, pressurePa: number) => number
    GetMoistAirEnthalpy: (temperatureC: number, ratio: number) => number
  }
  export default psychrolib
}
