// Words that guessers try first, bare of the figures and signs that people hang on them.
const WORDS = `
password passw pass passwd passport passphrase passcode parola motdepasse passwort contrasena wachtwoord
qwerty qwertyui qwertyuiop qwertyuiopasdfghjkl qwert qwertz qwertzuiop azerty azertyuiop asdf asdfgh asdfghjk asdfghjkl
asdfasdf qazwsx qazwsxedc qwer qwerasdf qwerasdfzxcv zxcv zxcvbn zxcvbnm poiuytrewq lkjhgfdsa mnbvcxz qweasd qweasdzxc
qazqaz wsxedc edcrfv 1q2w3e4r 1q2w3e4r5t 1q2w3e4r5t6y 1qaz2wsx 1qaz2wsx3edc q1w2e3r4 q1w2e3r4t5 zaq12wsx zaq1zaq1 1a2b3c4d
a1b2c3d4 abc abcd abcde abcdef abcdefg abcdefgh abcabc abcdabcd aabbcc aaabbb abc123 abcd1234 a1s2d3f4
letmein letmeinnow welcome welcomehome welcomeback hello hellohello helloworld hellothere goodbye opensesame open enter
admin administrator adminadmin root superuser superman sysadmin system login signin user username guest default
changeme changeit changethis temporary temp temppass newpassword mypassword yourpassword nopassword thepassword secret
topsecret secretsecret testing testtest test tester demo demonstration example sample access accessaccess master
iloveyou iloveu iloveme ilovehim iloveher loveyou lovelove lovely love loveme loverboy lovers sweetheart darling honey
sunshine moonlight moonshine starlight rainbow summer summertime winter spring springtime autumn monday tuesday wednesday
thursday friday saturday sunday january february march april august september october november december
princess prince queen king duchess angel angels angelina babygirl babyboy beautiful gorgeous handsome cutie sweetie
monkey monkeys dragon dragons tiger tigers lion lions eagle eagles panther jaguar falcon dolphin dolphins penguin elephant
butterfly ladybird kitten kitty kittycat puppy doggy hamster bulldog labrador spaniel terrier badger hedgehog squirrel
football footballer soccer cricket rugby tennis baseball basketball hockey swimming cycling fishing fisherman gardening
gardener running walking
liverpool everton chelsea arsenal arsenalfc tottenham spurs manchester manunited manutd mancity unitedfc celtic rangers
newcastle sunderland leeds leedsunited westham westhamunited villa astonvilla wolves birmingham sheffield nottingham
leicester southampton portsmouth brighton bristol cardiff swansea glasgow edinburgh aberdeen dundee belfast dublin london
england scotland ireland wales britain greatbritain unitedkingdom english british
michael jessica ashley daniel charlie charlotte thomas jordan andrew joshua matthew anthony robert william richard george
jennifer michelle nicole amanda samantha elizabeth victoria stephanie melissa hannah sophie emily olivia amelia jasmine
natalie chloe rebecca rachel sarah laura emma lauren bethany megan katie lucy alice daisy poppy rosie molly holly
alexander benjamin nicholas christopher jonathan patrick phillip stephen steven edward arthur harry oliver oscar
jackson jacob james joseph samuel francis martin simon peter david brian kevin graham
starwars startrek pokemon pikachu batman spiderman ironman wonderwoman superwoman gandalf harrypotter hogwarts frodo
gryffindor narnia minecraft fortnite nintendo playstation xbox gameboy mario zelda sonic metallica beatles nirvana
whatever whatsup nothing something anything everything everyone nobody somebody forever forevermore always never
trustno trustnoone trustme believe blessed blessing jesus jesuschrist christ heaven faith hope charity amen
freedom liberty justice peace happy happiness happyday lucky luckyday success winner champion champions victory
computer internet laptop keyboard desktop windows microsoft google facebook instagram twitter youtube amazon apple
samsung iphone android nokia mobile telephone phone email mailbox webmaster website
chocolate chocolates cheese cheesecake cookie cookies biscuit cupcake banana bananas orange oranges strawberry
cherry pumpkin pepper peppers ginger garlic coffee coffeecup whisky whiskey guinness cider beerbeer marmalade
purple yellow orangeblossom silver golden diamond emerald sapphire crystal pearl
family familyfirst mother father mummy daddy grandma grandad granny nana brother sister husband wife children baby
birthday birthdays christmas easter halloween holiday holidays weekend vacation wedding anniversary
school teacher student college university library museum church churchyard village cottage house household homehome
garden flower flowers roses rosebud primrose bluebell daffodil snowdrop lavender buttercup thistle
mercedes porsche ferrari jaguarxj landrover rangerover volkswagen vauxhall corsa mustang corvette harley yamaha suzuki
kawasaki honda toyota
shadow phantom ninja samurai warrior wizard magic magician merlin knight pirate captain sailor soldier hunter ranger
killer fuckyou fuckoff bollocks bugger arsehole bastard
treenail treenails brackenhythe lampwoman thelampwoman heritage heritagesociety society thesociety thedesk desk
everypegholds pegpeg treasurer chairman secretary trustee trustees committee sculpture lantern oaktree oaks timber
correcthorsebatterystaple letmeinplease openplease pleaseletmein donotenter keepout privateprivate
`;

export const COMMON_STEMS: ReadonlySet<string> = new Set(WORDS.split(/\s+/).filter((word) => word !== ''));
