/** Every text of the product, by language and feature. The server reads it whole; the browser loads one language (src/lib/i18n.ts). */
import enAccount from './en/account.json'
import enAdvisor from './en/advisor.json'
import enBasket from './en/basket.json'
import enCatalogue from './en/catalogue.json'
import enCheckout from './en/checkout.json'
import enCommon from './en/common.json'
import enErrors from './en/errors.json'
import enMail from './en/mail.json'
import enProductDesk from './en/product-desk.json'
import enSupportDesk from './en/support-desk.json'
import ptAccount from './pt/account.json'
import ptAdvisor from './pt/advisor.json'
import ptBasket from './pt/basket.json'
import ptCatalogue from './pt/catalogue.json'
import ptCheckout from './pt/checkout.json'
import ptCommon from './pt/common.json'
import ptErrors from './pt/errors.json'
import ptMail from './pt/mail.json'
import ptProductDesk from './pt/product-desk.json'
import ptSupportDesk from './pt/support-desk.json'

export const resources = {
  en: {
    account: enAccount,
    advisor: enAdvisor,
    basket: enBasket,
    catalogue: enCatalogue,
    checkout: enCheckout,
    common: enCommon,
    errors: enErrors,
    mail: enMail,
    'product-desk': enProductDesk,
    'support-desk': enSupportDesk,
  },
  pt: {
    account: ptAccount,
    advisor: ptAdvisor,
    basket: ptBasket,
    catalogue: ptCatalogue,
    checkout: ptCheckout,
    common: ptCommon,
    errors: ptErrors,
    mail: ptMail,
    'product-desk': ptProductDesk,
    'support-desk': ptSupportDesk,
  },
} as const
