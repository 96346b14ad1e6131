<?xml version="1.0" encoding="utf-8"?>
<!DOCTYPE TS>
<!-- SPDX-License-Identifier: GPL-3.0-or-later -->
<!-- English words that count: one and many. The other texts stand in the sources. -->
<TS version="2.1" language="en" sourcelanguage="en">
<context>
    <name>evenstroke::CardsPage</name>
    <message numerus="yes">
        <source>%n value(s) it gave the reading are taken out.</source>
        <translation>
            <numerusform>The one value it gave the reading is taken out.</numerusform>
            <numerusform>The %n values it gave the reading are taken out.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n value(s) put in</source>
        <translation>
            <numerusform>1 value put in</numerusform>
            <numerusform>%n values put in</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n earlier value(s) of a card corrected</source>
        <translation>
            <numerusform>1 earlier value of a card corrected</numerusform>
            <numerusform>%n earlier values of cards corrected</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n stood there already</source>
        <translation>
            <numerusform>1 stood there already</numerusform>
            <numerusform>%n stood there already</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n read by hand left as they are</source>
        <translation>
            <numerusform>1 read by hand left as it is</numerusform>
            <numerusform>%n read by hand left as they are</numerusform>
        </translation>
    </message>
</context>
<context>
    <name>evenstroke</name>
    <message numerus="yes">
        <source>%1, %n required box(es) empty: %2.</source>
        <translation>
            <numerusform>%1, 1 required box empty: %2.</numerusform>
            <numerusform>%1, %n required boxes empty: %2.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n matter(s) in doubt</source>
        <translation>
            <numerusform>1 matter in doubt</numerusform>
            <numerusform>%n matters in doubt</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n required box(es) empty</source>
        <translation>
            <numerusform>1 required box empty</numerusform>
            <numerusform>%n required boxes empty</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%1: %n remark(s).</source>
        <translation>
            <numerusform>%1: one remark.</numerusform>
            <numerusform>%1: %n remarks.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n remark(s)</source>
        <translation>
            <numerusform>1 remark</numerusform>
            <numerusform>%n remarks</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>carried by %n reading(s), the first of %1</source>
        <translation>
            <numerusform>carried by the reading of %1</numerusform>
            <numerusform>carried by %n readings, the first of %1</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%1 would have spoken at %n reading(s)</source>
        <translation>
            <numerusform>%1 would have spoken at one reading</numerusform>
            <numerusform>%1 would have spoken at %n readings</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%1: %n cylinder(s)</source>
        <translation>
            <numerusform>%1: 1 cylinder</numerusform>
            <numerusform>%1: %n cylinders</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>, read every %1 months, scatter as in its own %n reading(s).</source>
        <translation>
            <numerusform>, read every %1 months, scatter as in its own one reading.</numerusform>
            <numerusform>, read every %1 months, scatter as in its own %n readings.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n reading(s)</source>
        <translation>
            <numerusform>1 reading</numerusform>
            <numerusform>%n readings</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n value(s) to look at again at the next reading; nothing else stands out.</source>
        <translation>
            <numerusform>One value to look at again at the next reading; nothing else stands out.</numerusform>
            <numerusform>%n values to look at again at the next reading; nothing else stands out.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n more below.</source>
        <translation>
            <numerusform>One more below.</numerusform>
            <numerusform>%n more below.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n month(s) or more</source>
        <translation>
            <numerusform>1 month or more</numerusform>
            <numerusform>%n months or more</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n month(s)</source>
        <translation>
            <numerusform>1 month</numerusform>
            <numerusform>%n months</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n day(s) ago</source>
        <translation>
            <numerusform>1 day ago</numerusform>
            <numerusform>%n days ago</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n month(s) ago</source>
        <translation>
            <numerusform>1 month ago</numerusform>
            <numerusform>%n months ago</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n year(s) ago</source>
        <translation>
            <numerusform>1 year ago</numerusform>
            <numerusform>%n years ago</numerusform>
        </translation>
    </message>
</context>
<context>
    <name>evenstroke::RailButton</name>
    <message numerus="yes">
        <source>%1, %n new</source>
        <translation>
            <numerusform>%1, one new</numerusform>
            <numerusform>%1, %n new</numerusform>
        </translation>
    </message>
</context>
<context>
    <name>evenstroke::HistoryPage</name>
    <message numerus="yes">
        <source>%1 · %n engine(s)</source>
        <translation>
            <numerusform>%1 · 1 engine</numerusform>
            <numerusform>%1 · %n engines</numerusform>
        </translation>
    </message>
</context>
<context>
    <name>evenstroke::FleetModel</name>
    <message numerus="yes">
        <source>%n engine(s) learning</source>
        <translation>
            <numerusform>1 engine learning</numerusform>
            <numerusform>%n engines learning</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n engine(s) without data yet</source>
        <translation>
            <numerusform>1 engine without data yet</numerusform>
            <numerusform>%n engines without data yet</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n engine(s) quiet</source>
        <translation>
            <numerusform>1 engine quiet</numerusform>
            <numerusform>%n engines quiet</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source> %n place(s) concerned.</source>
        <translation>
            <numerusform> One place concerned.</numerusform>
            <numerusform> %n places concerned.</numerusform>
        </translation>
    </message>
</context>
<context>
    <name>evenstroke::FleetPage</name>
    <message numerus="yes">
        <source>%n engine(s)</source>
        <translation>
            <numerusform>1 engine</numerusform>
            <numerusform>%n engines</numerusform>
        </translation>
    </message>
</context>
<context>
    <name>evenstroke::EventsPage</name>
    <message numerus="yes">
        <source>%n event(s) · nothing is erased: what is removed stays in the audit trail</source>
        <translation>
            <numerusform>1 event · nothing is erased: what is removed stays in the audit trail</numerusform>
            <numerusform>%n events · nothing is erased: what is removed stays in the audit trail</numerusform>
        </translation>
    </message>
</context>
<context>
    <name>evenstroke::CardFilesPage</name>
    <message numerus="yes">
        <source>%n file(s)</source>
        <translation>
            <numerusform>1 file</numerusform>
            <numerusform>%n files</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n card(s) are left out: they cannot be read, or nobody has said of which cylinder they are.</source>
        <translation>
            <numerusform>1 card is left out: it cannot be read, or nobody has said of which cylinder it is.</numerusform>
            <numerusform>%n cards are left out: they cannot be read, or nobody has said of which cylinder they are.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>take %n card(s) into the reading of %1 (Ctrl+Enter)</source>
        <translation>
            <numerusform>take 1 card into the reading of %1 (Ctrl+Enter)</numerusform>
            <numerusform>take %n cards into the reading of %1 (Ctrl+Enter)</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n card(s) are taken in.</source>
        <translation>
            <numerusform>1 card is taken in.</numerusform>
            <numerusform>%n cards are taken in.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>The reading of %1 has %n card(s) in all.</source>
        <translation>
            <numerusform>The reading of %1 has 1 card in all.</numerusform>
            <numerusform>The reading of %1 has %n cards in all.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>Nothing is new: %n card(s) were there already.</source>
        <translation>
            <numerusform>Nothing is new: the card was there already.</numerusform>
            <numerusform>Nothing is new: all %n cards were there already.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n doubtful card(s) go in all the same, as you said.</source>
        <translation>
            <numerusform>1 doubtful card goes in all the same, as you said.</numerusform>
            <numerusform>%n doubtful cards go in all the same, as you said.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n doubtful card(s) stay out unless you say that they go in all the same.</source>
        <translation>
            <numerusform>1 doubtful card stays out unless you say that it goes in all the same.</numerusform>
            <numerusform>%n doubtful cards stay out unless you say that they go in all the same.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n were there already.</source>
        <translation>
            <numerusform>1 was there already.</numerusform>
            <numerusform>%n were there already.</numerusform>
        </translation>
    </message>
    <message numerus="yes">
        <source>%n sample(s) are missing.</source>
        <translation>
            <numerusform>1 sample is missing.</numerusform>
            <numerusform>%n samples are missing.</numerusform>
        </translation>
    </message>
</context>
</TS>
