/** Said wherever the command's answer may send somebody to a bottle. */
export const caution =
  "Acrylates and methacrylates sensitise skin, some initiators may damage fertility, violet and ultraviolet light harms eyes, resin in bulk can run hot. Gloves, eye protection, ventilation; the suppliers' safety data sheets, local rules and a competent person decide.";
