/** ISO 3166-1 alpha-2 codes; named on the server, whose list may differ from the browser's. */
const CODES = 'AD AE AL AM AR AT AU AZ BA BD BE BG BH BO BR BY CA CH CL CN CO CR CY CZ DE DK DO DZ EC EE EG ES FI FR GB GE GH GR GT HK HN HR HU ID IE IL IN IS IT JM JO JP KE KR KW KZ LB LI LK LT LU LV MA MC MD ME MK MT MU MX MY NG NI NL NO NP NZ OM PA PE PH PK PL PT PY QA RO RS RW SA SE SG SI SK SN SV TH TN TR TT TW TZ UA UG US UY UZ VN ZA ZM ZW'.split(' ');

const names = new Intl.DisplayNames('en', { type: 'region' });

export const COUNTRIES = CODES.map((value) => ({ value, label: names.of(value) ?? value })).sort((a, b) => a.label.localeCompare(b.label));
