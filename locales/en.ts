/** English, as the browser loads it. Mails are written on the server only. */
import account from './en/account.json'
import advisor from './en/advisor.json'
import basket from './en/basket.json'
import catalogue from './en/catalogue.json'
import checkout from './en/checkout.json'
import common from './en/common.json'
import errors from './en/errors.json'
import home from './en/home.json'
import productDesk from './en/product-desk.json'
import supportDesk from './en/support-desk.json'

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
