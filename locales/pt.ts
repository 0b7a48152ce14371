/** Portuguese, as the browser loads it. Mails are written on the server only. */
import account from './pt/account.json'
import advisor from './pt/advisor.json'
import basket from './pt/basket.json'
import catalogue from './pt/catalogue.json'
import checkout from './pt/checkout.json'
import common from './pt/common.json'
import errors from './pt/errors.json'
import home from './pt/home.json'
import productDesk from './pt/product-desk.json'
import supportDesk from './pt/support-desk.json'

export const texts = {
  account,
  advisor,
  basket,
  catalogue,
  checkout,
  common,
  errors,
  home,
  'product-desk': productDesk,
  'support-desk': supportDesk,
}
