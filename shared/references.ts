/** Every published source once, by key; docstrings, data, tests and screens cite the key. */
export const references = {
  cao1995:
    'Cao and Rhinehart, An efficient method for on-line identification of steady state, J. Process Control 5 (1995) 363-374',
  crc2014: 'CRC Handbook of Chemistry and Physics, 95th ed. 2014',
  harvey1989: 'Harvey, Forecasting, Structural Time Series Models and the Kalman Filter, Cambridge 1989',
  hankinson1979: 'COSTALD: Hankinson and Thomson, AIChE J. 25 (1979) 653-663',
  horstmann2005: 'PSRK Revision 4 appendix: Horstmann et al., Fluid Phase Equilib. 227 (2005) 157',
  huber2022: 'NIST REFPROP constants as listed by Huber et al., Ind. Eng. Chem. Res. 61 (2022) 15449',
  iapws95: 'IAPWS-95, the International Association for the Properties of Water and Steam',
  iec60751: 'IEC 60751, industrial platinum resistance thermometers: tolerance classes',
  gum: 'JCGM 100:2008, Guide to the expression of uncertainty in measurement',
  kalman1960:
    'Kalman, A new approach to linear filtering and prediction problems, J. Basic Eng. 82 (1960) 35-45',
  knapp1982:
    'DECHEMA Chemistry Data Series vol. VI (Knapp et al. 1982), as in the ChemSep file of DECHEMA Peng-Robinson parameters',
  mcgarry1983: 'McGarry, Ind. Eng. Chem. Process Des. Dev. 22 (1983) 313-322',
  michelsen1980: 'Michelsen, Fluid Phase Equilib. 4 (1980) 1-10',
  peng1976: 'Peng and Robinson, Ind. Eng. Chem. Fundam. 15 (1976) 59-64',
  perry2007: "Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2007",
  poling2001: "Poling, Prausnitz, O'Connell: The Properties of Gases and Liquids, 5th ed., McGraw-Hill 2001",
  rachford1952: 'Rachford and Rice, J. Pet. Technol. 4 (1952) 10, section 1',
  vdi2010: 'VDI Heat Atlas, 2nd ed., Springer 2010',
  webbook: 'NIST Chemistry WebBook (SRD 69), phase-change data',
  wilson1969: 'Wilson, 65th National AIChE Meeting, Cleveland 1969 (from memory)',
  yaws2014: 'Yaws, Thermophysical Properties of Chemicals and Hydrocarbons, 2nd ed. 2014',
} as const;

export type Reference = keyof typeof references;
