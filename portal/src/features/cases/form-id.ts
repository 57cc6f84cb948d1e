/** Of the form of a case, for the buttons that stand outside it. */
export const FORM_ID = 'case-form'
