/** What the demo wheelsets are called and described as: [tagline, description] by sku and language. Product words, so data, not page texts. */
type Words = [tagline: string, description: string]

// prettier-ignore
export const texts: Record<string, Record<'en' | 'pt', Words>> = {
  'ELM-30-D': {
    en: ['A quiet pair for long climbs', 'Thirty millimetres of carbon and twenty-four spokes at the back. Elm 30 is for riders who count metres of ascent rather than minutes on the flat. It takes side wind without fuss.'],
    pt: ['Um par discreto para subidas longas', 'Trinta milímetros de carbono e vinte e quatro raios atrás. A Elm 30 é para quem conta metros de desnível e não minutos em plano. Aceita o vento de lado sem se queixar.'],
  },
  'ELM-40-D': {
    en: ['Carbon spokes, for light riders in the hills', 'Bonded carbon spokes keep the mass low, and they ask for care against knocks from the side. The limit is set with that in mind. Each pair is laced to order in Aveiro.'],
    pt: ['Raios de carbono, para ciclistas leves na serra', 'Os raios de carbono colados mantêm a massa baixa e pedem cuidado com pancadas laterais. O limite foi escolhido a pensar nisso. Cada par é enraiado por encomenda, em Aveiro.'],
  },
  'ROWAN-35-D': {
    en: ['One pair for most of the week', 'Deep enough to notice on the flat, shallow enough to forget in a gust. Twenty-four spokes on both wheels, a hooked rim, tyres from 28 mm. If you own a single road bike, begin here.'],
    pt: ['Um par para quase toda a semana', 'Alto o bastante para se notar em plano, baixo o bastante para esquecer numa rajada. Vinte e quatro raios em cada roda, aro com gancho, pneus a partir de 28 mm. Com uma só bicicleta de estrada, comece aqui.'],
  },
  'ROWAN-45-D': {
    en: ['Middle depth, middle width, even temper', 'The rim we build when nothing else is asked for. It holds speed on rolling roads, and its hooks leave the choice of tyre to you. The front spokes are as many as the rear, for an even feel out of the saddle.'],
    pt: ['Altura média, largura média, bom feitio', 'O aro que montamos quando nada mais nos pedem. Mantém a velocidade em estrada ondulada, e os ganchos deixam-lhe a escolha do pneu. À frente há tantos raios como atrás, para se sentir igual de pé.'],
  },
  'ROWAN-60-D': {
    en: ['For open roads and a steady hand', 'Sixty millimetres earn their keep above thirty kilometres an hour. In gusts you will feel them at the bars, so look at the wind question of your fitting first. The spokes and hubs are the ones of Rowan 45.'],
    pt: ['Para estradas abertas e mão firme', 'Sessenta milímetros compensam acima dos trinta à hora. Com rajadas sentem-se no guiador, por isso veja primeiro a pergunta do vento. Os raios e os cubos são os da Rowan 45.'],
  },
  'ROWAN-45-60-D': {
    en: ['Depth at the back, calm at the front', 'The rear wheel does not steer, so it may carry more rim. The front stays at 45 mm and keeps the bars settled. A pair for fast groups and the odd race against the clock.'],
    pt: ['Altura atrás, sossego à frente', 'A roda de trás não vira, por isso pode ter mais aro. A da frente fica nos 45 mm e deixa o guiador tranquilo. Um par para grupos rápidos e um ou outro contrarrelógio.'],
  },
  'HORNBEAM-35-D': {
    en: ['Thirty-two spokes behind a modest rim', 'Hornbeam is the wood of mallets and cogs. This pair is laced for riders above ninety kilograms and for roads that have seen better years. Wide tyres sit well on its 22 mm bed.'],
    pt: ['Trinta e dois raios num aro modesto', 'A carpa é a madeira dos maços e das engrenagens. Este par é enraiado para quem pesa mais de noventa quilos e para estradas que já viram melhores dias. Pneus largos assentam bem nos 22 mm.'],
  },
  'HORNBEAM-45-D': {
    en: ['Carbon that carries a heavy total', 'Twenty-eight spokes in front, thirty-two behind, and a rim deep enough to share the load among them. It will take bags as well as a big rider, up to its stated total. Built on the bench, one pair at a time.'],
    pt: ['Carbono para um total elevado', 'Vinte e oito raios à frente, trinta e dois atrás, e um aro alto que reparte a carga por eles. Leva malas e ciclistas grandes, até ao total indicado. Montado na bancada, um par de cada vez.'],
  },
  'YEW-60-80-D': {
    en: ['For flat courses and still mornings', 'An eighty behind a sixty, made for riding alone against the clock. It asks for calm air and arms at rest on the pads. On a gusty day, put your everyday wheels back in.'],
    pt: ['Para percursos planos e manhãs paradas', 'Uma oitenta atrás de uma sessenta, feita para andar sozinho contra o relógio. Pede ar calmo e braços pousados nos apoios. Em dia de rajadas, volte às rodas do costume.'],
  },
  'YEW-80-D': {
    en: ['Eighty at both ends, for the practised', 'Much rim, few spokes, one purpose. The front wheel answers to side wind at once, and we only propose it where the air is sheltered and the rider says so. Long valves come with the pair.'],
    pt: ['Oitenta nas duas pontas, para quem tem prática', 'Muito aro, poucos raios, um só fim. A roda da frente responde logo ao vento lateral, e só a propomos com ar abrigado e quando o ciclista o diz. As válvulas compridas vêm com o par.'],
  },
  'ALDER-35-D': {
    en: ['Straight-sided rims for 28 mm and up', 'Alder has no hooks: the tyre must be made for that and must be 28 mm or wider, at 5 bar or less. In return the rim wall is plain and strong. A gentle pair for rough lanes.'],
    pt: ['Aros de parede direita, de 28 mm para cima', 'A Alder não tem ganchos: o pneu tem de ser feito para isso e ter 28 mm ou mais, a 5 bar no máximo. Em troca, a parede do aro é simples e robusta. Um par macio para caminhos gastos.'],
  },
  'ALDER-45-D': {
    en: ['A wide hookless rim with some depth', 'At 23 mm inside it gives a 30 mm tyre a round shoulder and room for low pressure. Check that your tyre names hookless rims on its side. If it does not, Rowan 45 is the same idea with hooks.'],
    pt: ['Um aro largo, sem ganchos e com alguma altura', 'Com 23 mm por dentro, dá ombros redondos a um pneu de 30 mm e espaço para pouca pressão. Veja se o pneu menciona aros sem gancho. Se não, a Rowan 45 é a mesma ideia com ganchos.'],
  },
  'ALDER-50-65-D': {
    en: ['Fast, hookless, and honest about it', 'Fifty in front and sixty-five behind for a light rider on smooth roads. The tyre list is short by nature: 28 mm or more, hookless on the label. Its ready-to-ride limit is lower than that of its siblings.'],
    pt: ['Rápida, sem ganchos, e sem o esconder', 'Cinquenta à frente e sessenta e cinco atrás, para ciclistas leves em piso liso. A lista de pneus é curta: 28 mm ou mais, com indicação de aro sem gancho. O limite pronto a rodar é mais baixo do que o das irmãs.'],
  },
  'POPLAR-30-D': {
    en: ['Where the tarmac ends, keep rolling', 'A 25 mm bed for tyres from 32 mm, on a low rim that shrugs at crosswinds. Poplar moves from lane to track and back without a change of wheels. Four more spokes behind than in front.'],
    pt: ['Onde o alcatrão acaba, continue', 'Uma base de 25 mm para pneus a partir de 32 mm, num aro baixo indiferente ao vento. A Poplar passa da estrada ao caminho e volta sem mudar de rodas. Atrás tem mais quatro raios do que à frente.'],
  },
  'ASH-25-D': {
    en: ['Plain alloy, good spokes, a fair price', 'Ash is what cart shafts were made of: it bends a little and lasts. A welded alloy rim, J-bend spokes that any workshop stocks, and a limit that suits most riders. Nothing here needs a special tool.'],
    pt: ['Alumínio simples, bons raios, preço justo', 'De freixo se faziam os varais das carroças: cede um pouco e dura. Aro de alumínio soldado, raios em J que qualquer oficina tem, e um limite que serve a maioria. Nada aqui pede ferramenta especial.'],
  },
  'ASH-28-D': {
    en: ['A lighter Ash for lighter riders', 'Twenty-four spokes at both ends and a slightly deeper rim. It climbs willingly and costs no more than a pair of good tyres and a weekend away. Mind the limit, which is lower than that of Ash 25.'],
    pt: ['Uma Ash mais leve para quem pesa menos', 'Vinte e quatro raios em cada roda e um aro um pouco mais alto. Sobe de bom grado e custa o mesmo que bons pneus e um fim de semana fora. Atenção ao limite, mais baixo do que o da Ash 25.'],
  },
  'ASH-30-D': {
    en: ['Alloy with margin', 'Twenty-eight and thirty-two spokes on a 22 mm bed. Made for riders who want a number well above their own total, and for daily roads with drains and cobbles. Tyres from 28 to 49 mm.'],
    pt: ['Alumínio com folga', 'Vinte e oito e trinta e dois raios numa base de 22 mm. Para quem quer um número bem acima do seu total, e para ruas diárias com grelhas e calçada. Pneus de 28 a 49 mm.'],
  },
  'OAK-28-D': {
    en: ['Thirty-six spokes, twice', 'A broken spoke in thirty-six leaves a wheel that gets you home. Oak 28 is for big riders and long days on the road, at a pace that leaves time to look around. The bench checks every tension before it leaves.'],
    pt: ['Trinta e seis raios, duas vezes', 'Um raio partido em trinta e seis deixa uma roda que chega a casa. A Oak 28 é para ciclistas grandes e dias longos na estrada, a um ritmo que dá para ver a paisagem. Na bancada medimos cada tensão antes de sair.'],
  },
  'OAK-25-D': {
    en: ['For panniers, rain and the road to work', 'Thirty-two in front, thirty-six behind, as touring builders have done for long. The hubs take quick release or through axles with the caps in the box. Six-bolt rotors, found in any town.'],
    pt: ['Para alforges, chuva e o caminho do trabalho', 'Trinta e dois à frente, trinta e seis atrás, como se faz há muito para viajar. Os cubos aceitam aperto rápido ou eixo passante com as pontas incluídas. Discos de seis parafusos, que há em qualquer vila.'],
  },
  'OAK-30-D': {
    en: ['Wide alloy for loaded tracks', 'A 25 mm bed carries tyres of 35 mm and more, for forest roads with bags on. Every bag counts in the ready-to-ride total, so type them in. Spare spokes of both lengths come with the pair.'],
    pt: ['Alumínio largo para caminhos com carga', 'Uma base de 25 mm leva pneus de 35 mm ou mais, para estradões com malas. Cada mala conta no total pronto a rodar, por isso indique-as. Com o par vão raios de reserva dos dois comprimentos.'],
  },
  'LINDEN-25-D': {
    en: ['Rated for assisted bikes in town', 'A motor pulls harder on spokes than legs do, at every green light. Linden has hubs made for that, and thirty-six spokes to share it. Choose it where the fitting asks about assistance.'],
    pt: ['Aprovada para bicicletas assistidas na cidade', 'Um motor puxa mais pelos raios do que as pernas, a cada sinal verde. A Linden tem cubos feitos para isso e trinta e seis raios para o repartir. Escolha-a quando a pergunta for a assistência.'],
  },
  'LINDEN-30-D': {
    en: ['Assisted, on carbon, off the tarmac too', 'Assist-rated hubs under a carbon rim, with thirty-two spokes at both ends. It suits a motor bike that leaves the town on Saturdays. Hooked, so tubes and many tyres will do.'],
    pt: ['Assistida, em carbono, também fora do alcatrão', 'Cubos para assistência sob um aro de carbono, com trinta e dois raios em cada roda. Serve a bicicleta com motor que sai da cidade ao sábado. Com gancho: aceita câmaras e muitos pneus.'],
  },
  'SPINDLE-28-D': {
    en: ['The smaller wheel for assisted bikes', 'Bead seat 584 mm, for frames built around wide tyres and low standover. The rear wheel has four more spokes, where motor and bags sit. Cargo bikes need another wheel, and the fitting will say so.'],
    pt: ['A roda mais pequena para bicicletas assistidas', 'Assento de 584 mm, para quadros de pneu largo e tubo baixo. A de trás tem mais quatro raios, onde pesam o motor e as malas. Bicicletas de carga pedem outra roda, e dizemo-lo logo.'],
  },
  'WALNUT-30-D': {
    en: ['For assisted trail bikes', 'Wide flanges, thirty-two spokes and a hookless rim of 30 mm inside. The hubs are rated for a motor, the rest is the Holly you may know. Low pressures only: the rim is marked 3 bar.'],
    pt: ['Para bicicletas de trilho assistidas', 'Abas largas, trinta e dois raios e um aro sem gancho com 30 mm por dentro. Os cubos admitem motor; o resto é a Holly que talvez conheça. Só pressões baixas: o aro está marcado para 3 bar.'],
  },
  'BEECH-25-R': {
    en: ['A brake track that likes mountains', 'Alloy sheds the heat of a long descent better than carbon can. Twenty-four spokes in front, twenty-eight behind, and replaceable pads from any shop. For bikes that were good then and are good now.'],
    pt: ['Uma pista de travagem que gosta de serra', 'O alumínio larga o calor de uma descida longa melhor do que o carbono. Vinte e quatro raios à frente, vinte e oito atrás, e calços de qualquer loja. Para bicicletas que eram boas e continuam a ser.'],
  },
  'BEECH-28-R': {
    en: ['A light alloy pair for rim brakes', 'Twenty and twenty-four spokes keep it lively under a light rider. The limit of 95 kilograms counts bike and bottles too. Fit the old pads only if they are free of grit.'],
    pt: ['Um par leve de alumínio para travões de aro', 'Vinte e vinte e quatro raios deixam-na viva com um ciclista leve. O limite de 95 quilos conta também a bicicleta e os bidões. Use os calços antigos só se não tiverem areia.'],
  },
  'BEECH-30-R': {
    en: ['Rim brakes, more spokes, wider bed', 'A 19 mm bed lets a 28 mm tyre stand properly, where the frame has room. Thirty-two rear spokes for riders near a hundred kilograms. Measure the opening of your calipers before you order.'],
    pt: ['Travões de aro, mais raios, base mais larga', 'Uma base de 19 mm assenta bem um pneu de 28 mm, se o quadro tiver espaço. Trinta e dois raios atrás para quem ronda os cem quilos. Meça a abertura dos travões antes de encomendar.'],
  },
  'MAPLE-20-R': {
    en: ['The everyday wheel, kept simple', 'A low box rim with thirty-two and thirty-six spokes. It has been built like this for decades because every part can be had and every mechanic knows it. For the commute and the long way home.'],
    pt: ['A roda de todos os dias, sem complicar', 'Um aro baixo de caixa com trinta e dois e trinta e seis raios. Faz-se assim há décadas, porque todas as peças se arranjam e todos os mecânicos a conhecem. Para o trabalho e para o caminho mais longo até casa.'],
  },
  'MAPLE-25-R': {
    en: ['More rim behind the same spokes', 'Five millimetres more depth than Maple 20 and a higher stated limit. It carries a rider and two panniers over wet hills with brakes that still bite. Laced on the bench, tension sheet included.'],
    pt: ['Mais aro com os mesmos raios', 'Mais cinco milímetros do que a Maple 20 e um limite indicado mais alto. Leva ciclista e dois alforges por serras molhadas, com travões que ainda mordem. Enraiada na bancada, com folha de tensões.'],
  },
  'WILLOW-35-R': {
    en: ['Carbon for rim brakes, in rolling country', 'Willow keeps a good rim-brake frame in service. Use the pads that come with it and no others. For long mountain descents we point to Beech instead, and the sum of brake heat shows why.'],
    pt: ['Carbono para travões de aro, em terreno ondulado', 'A Willow mantém em uso um bom quadro de travões de aro. Use os calços que a acompanham e mais nenhuns. Para longas descidas de serra indicamos a Beech, e a conta do calor mostra porquê.'],
  },
  'WILLOW-45-R': {
    en: ['Sixteen and twenty, for dry fast days', 'Few spokes in deep rims, for light riders on roads they know. The front wheel is laced radially, as its hub allows. It is a second pair, happiest beside an alloy one.'],
    pt: ['Dezasseis e vinte, para dias secos e rápidos', 'Poucos raios em aros altos, para ciclistas leves em estradas conhecidas. A da frente tem raios radiais, como o cubo permite. É um segundo par, que fica bem ao lado de um de alumínio.'],
  },
  'WILLOW-50-R': {
    en: ['Fifty millimetres with a useful limit', 'Twenty and twenty-four spokes give it more reserve than Willow 45. It likes open plains and steady gears. The brake track warms on long slopes, so let the road choose.'],
    pt: ['Cinquenta milímetros com um limite útil', 'Vinte e vinte e quatro raios dão-lhe mais reserva do que a Willow 45. Gosta de planícies abertas e andamentos certos. A pista aquece em descidas longas, por isso deixe a estrada escolher.'],
  },
  'WILLOW-60-80-R': {
    en: ['For the time trial bike you kept', 'A sixty in front, an eighty behind, for calipers rather than discs. Meant for flat courses and still air. Built to order, as we keep few rims of this kind.'],
    pt: ['Para a bicicleta de contrarrelógio que guardou', 'Sessenta à frente, oitenta atrás, para pinças e não discos. Pensada para percursos planos e ar parado. Feita por encomenda, pois guardamos poucos aros destes.'],
  },
  'HAZEL-30-D': {
    en: ['Gravel without drama', 'A low hookless rim, 25 mm inside, twenty-four spokes each. Forty millimetre tyres at modest pressure take the sting out of stones. The same pair will start a cyclocross race in winter.'],
    pt: ['Gravilha sem dramas', 'Um aro baixo sem gancho, 25 mm por dentro, vinte e quatro raios em cada roda. Pneus de quarenta a pressão moderada tiram o gume às pedras. No inverno, o mesmo par alinha numa prova de ciclocrosse.'],
  },
  'HAZEL-40-D': {
    en: ['A little depth for long gravel days', 'Forty millimetres help on the windless straights between two forests. Twenty-eight rear spokes leave room for a frame bag and a tent. Bags at the handlebar catch more wind than the rim does.'],
    pt: ['Alguma altura para longos dias de gravilha', 'Quarenta milímetros ajudam nas retas sem vento entre duas matas. Vinte e oito raios atrás deixam margem para uma bolsa de quadro e uma tenda. As malas no guiador apanham mais vento do que o aro.'],
  },
  'HAZEL-45-D': {
    en: ['For racing over white roads', 'The deeper Hazel, twenty-four spokes, tyres from 32 mm. Deep rims share a knock among more spokes, and they show a scuff sooner. Bring it in after a hard season and we measure the tensions.'],
    pt: ['Para correr em estradas brancas', 'A Hazel mais alta, vinte e quatro raios, pneus a partir de 32 mm. Aros altos repartem uma pancada por mais raios e mostram mais cedo um risco. Traga-a depois de uma época dura e medimos as tensões.'],
  },
  'LARCH-30-D': {
    en: ['Bags on, hooks in, far from home', 'A hooked carbon rim so that a tube will fix a torn tyre. Twenty-eight and thirty-two spokes carry rider, bike and a week of food. Larch holds its shape in wet ground, hence the name.'],
    pt: ['Malas postas, ganchos no aro, longe de casa', 'Aro de carbono com gancho, para que uma câmara resolva um pneu rasgado. Vinte e oito e trinta e dois raios levam ciclista, bicicleta e comida para uma semana. O larício aguenta terra molhada, daí o nome.'],
  },
  'LARCH-25-D': {
    en: ['An alloy gravel wheel for the wet months', 'A knock shows on alloy as a dent that anybody can see and a mechanic can judge. Twenty-eight and thirty-two spokes, hooked, tyres from 30 mm. Good for winter, good for lending.'],
    pt: ['Uma roda de alumínio para os meses molhados', 'No alumínio, uma pancada deixa uma mossa que se vê e que um mecânico sabe avaliar. Vinte e oito e trinta e dois raios, com gancho, pneus a partir de 30 mm. Boa para o inverno, boa para emprestar.'],
  },
  'JUNIPER-25-D': {
    en: ['Small wheels, wide tyres, gravel', 'Bead seat 584 mm for frames that trade diameter for rubber. The 25 mm bed suits tyres of 47 mm. Check with the frame maker before you swap sizes.'],
    pt: ['Rodas pequenas, pneus largos, gravilha', 'Assento de 584 mm para quadros que trocam diâmetro por borracha. A base de 25 mm convém a pneus de 47 mm. Confirme com o fabricante do quadro antes de trocar de medida.'],
  },
  'MEDLAR-35-D': {
    en: ['Carbon in the smaller size', 'For gravel bikes with 584 mm wheels and room for plump tyres. Hookless, so the tyre must say that it may. Twenty-eight spokes at the rear, where the weight is.'],
    pt: ['Carbono na medida mais pequena', 'Para bicicletas de gravilha com rodas de 584 mm e espaço para pneus cheios. Sem gancho, por isso o pneu tem de o permitir. Vinte e oito raios atrás, onde está o peso.'],
  },
  'CHERRY-35-D': {
    en: ['Mud, kerbs and an hour of work', 'A hooked rim of 21 mm that holds a 33 mm tyre at low pressure. Twenty-four spokes each keep it true after a winter of barriers. Rinse it gently, away from the bearings.'],
    pt: ['Lama, lancis e uma hora de esforço', 'Um aro com gancho de 21 mm que segura um pneu de 33 mm a baixa pressão. Vinte e quatro raios em cada roda mantêm-na direita depois de um inverno de obstáculos. Lave-a com calma, longe dos rolamentos.'],
  },
  'BIRCH-25-D': {
    en: ['Cross-country for the light of frame', 'Twenty-four spokes and a limit to match. Birch is quick to turn and quick to slow, and it wants a rider who picks a line. Heavier riders will find Holly on the same page.'],
    pt: ['Cross-country para ciclistas leves', 'Vinte e quatro raios e um limite a condizer. A Birch vira depressa, trava depressa e quer alguém que escolha a trajetória. Quem pesa mais encontra a Holly na mesma página.'],
  },
  'HOLLY-25-D': {
    en: ['A cross-country pair with sense', 'Twenty-eight spokes on wide flanges and a 30 mm hookless bed. Tyres around 56 mm at low pressure give it grip on roots. Few spoke lengths, so few spares to keep.'],
    pt: ['Um par de cross-country com juízo', 'Vinte e oito raios em abas largas e uma base de 30 mm sem gancho. Pneus de cerca de 56 mm a baixa pressão agarram nas raízes. Poucos comprimentos de raio, poucas peças de reserva.'],
  },
  'HOLLY-30-D': {
    en: ['Between race day and rough trail', 'Four spokes more behind, five millimetres more rim. It forgives a late choice of line where Holly 25 would complain. For riders who do both and own one bike.'],
    pt: ['Entre o dia de prova e o trilho bravo', 'Mais quatro raios atrás, mais cinco milímetros de aro. Perdoa uma trajetória tardia onde a Holly 25 se queixaria. Para quem faz as duas coisas com uma só bicicleta.'],
  },
  'MULBERRY-25-D': {
    en: ['Cross-country on 584', 'The smaller wheel turns sooner and suits smaller riders and frames. Rim, spokes and hubs are those of Holly 25, cut to size. There is often one pair left and rarely more.'],
    pt: ['Cross-country em 584', 'A roda mais pequena vira mais cedo e convém a ciclistas e quadros pequenos. Aro, raios e cubos são os da Holly 25, à medida. Costuma haver um par, raramente mais.'],
  },
  'SYCAMORE-30-D': {
    en: ['For trails with steps in them', 'Thirty-two spokes at both ends and a low, wide rim in 584 mm. It is made for small drops and loose stone, and its use class says how far that goes. Keep the tyre wide and read its lower mark.'],
    pt: ['Para trilhos com degraus', 'Trinta e dois raios em cada roda e um aro baixo e largo em 584 mm. É feita para pequenos saltos e pedra solta, e a classe de uso diz até onde. Mantenha o pneu largo e leia a marca mínima.'],
  },
}
