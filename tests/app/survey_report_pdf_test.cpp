// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/survey/event_labels.h"
#include "app/survey/report_layout.h"
#include "app/survey/report_writer.h"
#include "tests/core/survey_fixture.h"

#include <gtest/gtest.h>

#include <QElapsedTimer>
#include <QFile>
#include <QFileInfo>
#include <QImage>
#include <QPrinter>
#include <QProcess>
#include <QStandardPaths>
#include <QTemporaryDir>

#include <iostream>

namespace evenstroke {
namespace {

using namespace survey_fixture;

/// The fixture's cylinder quantity again under other names, so that a report is as long as a real one.
Judgement long_judgement(int cylinders, int months)
{
    Scene scene;
    scene.cylinders = cylinders;
    scene.months = months;
    scene.unsteady = {3};
    scene.skipped = {7};
    Judgement judgement = make_judgement(scene);
    auto record = std::make_shared<EngineRecord>(*judgement.record);
    const QuantityId first = id_of("compression_pressure");
    const char* others[] = {"maximum_pressure", "mean_indicated_pressure", "exhaust_temperature", "fuel_index", "jacket_outlet_temperature",
                            "piston_coolant_outlet_temperature", "liner_temperature", "scavenge_box_temperature"};
    for (const char* name : others) {
        const QuantityId id = id_of(name);
        for (std::size_t i = 0; i < record->readings.size(); ++i) {
            auto& values = record->readings[i].values;
            std::erase_if(values, [&](const Value& value) { return value.quantity == id; });
            for (const JudgedValue& judged : std::vector<JudgedValue>(judgement.readings[i].values))
                if (judged.quantity == first) {
                    JudgedValue copy = judged;
                    copy.quantity = id;
                    judgement.readings[i].values.push_back(copy);
                    Value value = values[judged.value_index];
                    value.quantity = id;
                    value.unit = quantity(id).unit;
                    values.push_back(value);
                }
        }
        for (const Trend& trend : std::vector<Trend>(judgement.trends))
            if (trend.quantity == first) {
                judgement.trends.push_back(trend);
                judgement.trends.back().quantity = id;
            }
    }
    for (const char* name : {"speed", "turbocharger_speed", "scavenge_temperature", "inlet_air_temperature", "exhaust_before_turbine", "lube_oil_inlet_pressure"})
        for (Reading& reading : record->readings)
            reading.values.push_back(typed(*find_quantity(name), Place::engine(), "100.5", 100.5));
    judgement.record = record;
    return judgement;
}

SurveyReport report_of(const Judgement& judgement, int months)
{
    return make_survey_report(judgement, last_months(day("2031-03-31"), months), make_details());
}

std::string whole_file(const QString& path)
{
    QFile file(path);
    return file.open(QIODevice::ReadOnly) ? file.readAll().toStdString() : std::string();
}

/// Output of a program, or nothing where it is not installed.
std::optional<QByteArray> output_of(const QString& program, const QStringList& arguments)
{
    if (QStandardPaths::findExecutable(program).isEmpty())
        return std::nullopt;
    QProcess process;
    process.start(program, arguments);
    if (!process.waitForFinished(60000) || process.exitCode() != 0)
        return QByteArray();
    return process.readAllStandardOutput();
}

class SurveyPdf : public testing::Test
{
protected:
    QString path(const char* name) const { return folder_.filePath(QString::fromLatin1(name)); }
    QTemporaryDir folder_;
};

TEST_F(SurveyPdf, TwelveCylindersAndFiveYearsStayBelowAMegabyte)
{
    const Judgement judgement = long_judgement(12, 60);
    QElapsedTimer timer;
    timer.start();
    const SurveyReport report = report_of(judgement, 60);
    const qint64 made = timer.restart();
    const ReportLayout layout = lay_out(std::make_shared<const SurveyReport>(report));
    const qint64 laid_out = timer.restart();
    ASSERT_TRUE(write_survey_pdf(layout, path("long.pdf")).has_value());
    const qint64 written = timer.elapsed();
    const qint64 size = QFileInfo(path("long.pdf")).size();
    std::cout << "report of 12 cylinders and 60 months: contents " << made << " ms, pages " << laid_out << " ms, file " << written << " ms, "
              << layout.pages.size() << " pages, " << size << " bytes\n"; // printed, never judged: machines differ
    EXPECT_LE(size, 1'000'000);
    EXPECT_GT(layout.pages.size(), 40u) << "every reading of every quantity is there";
}

TEST_F(SurveyPdf, IsArchivalPdfWithFontsEmbeddedAndNothingTransparent)
{
    ASSERT_TRUE(write_survey_pdf(report_of(make_judgement(), 12), path("a.pdf")).has_value());
    const std::string file = whole_file(path("a.pdf"));
    EXPECT_NE(file.find("pdfaid:part=\"1\""), std::string::npos);
    EXPECT_NE(file.find("pdfaid:conformance=\"B\""), std::string::npos);
    EXPECT_NE(file.find("/OutputIntents"), std::string::npos);
    EXPECT_NE(file.find("/FontFile2"), std::string::npos) << "embedded TrueType";
    // "No soft mask" may be said (ISO 19005-1, 6.4, from memory); any other mask would be transparency.
    for (std::size_t at = file.find("/SMask"); at != std::string::npos; at = file.find("/SMask", at + 1))
        EXPECT_EQ(file.compare(at, 12, "/SMask /None"), 0);
    EXPECT_EQ(file.find("/Encrypt"), std::string::npos);
}

TEST_F(SurveyPdf, CanBeSearched)
{
    ASSERT_TRUE(write_survey_pdf(report_of(make_judgement(), 12), path("a.pdf")).has_value());
    const auto text = output_of("pdftotext", {"-layout", path("a.pdf"), "-"});
    if (!text)
        GTEST_SKIP() << "pdftotext is not installed";
    const QString words = QString::fromUtf8(*text).simplified();
    for (const char* part : {"takes no survey's place", "the surveyor decides", "has fallen 0.6 bar a month", "once in 400 engine-years",
                             "Quiet Barley, Main engine, 2030-04-01 to 2031-03-31", "page 1 of", "out of order", "not read", "Never open a scavenge space"})
        EXPECT_TRUE(words.contains(QString::fromUtf8(part))) << part;
}

TEST_F(SurveyPdf, PrintsInBlackAndGreyOnly)
{
    ASSERT_TRUE(write_survey_pdf(report_of(long_judgement(6, 12), 12), path("a.pdf")).has_value());
    if (!output_of("pdftoppm", {"-r", "40", "-png", path("a.pdf"), path("page")}))
        GTEST_SKIP() << "pdftoppm is not installed";
    int pages = 0;
    for (const QFileInfo& picture : QDir(folder_.path()).entryInfoList({"page*.png"})) {
        const QImage image(picture.filePath());
        ASSERT_FALSE(image.isNull());
        ++pages;
        for (int y = 0; y < image.height(); ++y)
            for (int x = 0; x < image.width(); ++x) {
                const QRgb colour = image.pixel(x, y);
                ASSERT_TRUE(qRed(colour) == qGreen(colour) && qGreen(colour) == qBlue(colour))
                    << picture.fileName().toStdString() << " at " << x << ", " << y;
            }
    }
    EXPECT_GT(pages, 5);
}

TEST_F(SurveyPdf, EveryPageCarriesShipPeriodAndNumber)
{
    const ReportLayout layout = lay_out(std::make_shared<const SurveyReport>(report_of(long_judgement(6, 24), 24)));
    for (std::size_t i = 0; i < layout.pages.size(); ++i) {
        QStringList texts;
        for (const PageItem& item : layout.pages[i].items)
            if (const TextItem* text = std::get_if<TextItem>(&item))
                texts.append(text->text);
        EXPECT_TRUE(texts.contains(QStringLiteral("page %1 of %2").arg(i + 1).arg(layout.pages.size())));
        EXPECT_TRUE(texts.contains("Quiet Barley, Main engine, 2029-04-01 to 2031-03-31"));
        EXPECT_TRUE(texts.contains("report Main engine 2031-04-02"));
    }
}

TEST_F(SurveyPdf, NothingStandsOutsideThePage)
{
    for (const int cylinders : {1, 6, 9, 12, 20}) {
        const ReportLayout layout = lay_out(std::make_shared<const SurveyReport>(report_of(long_judgement(cylinders, 14), 14)));
        const TextMeasure measure;
        for (const ReportPage& page : layout.pages)
            for (const PageItem& item : page.items)
                if (const TextItem* text = std::get_if<TextItem>(&item)) {
                    EXPECT_GE(text->x, 40.0) << cylinders << ": " << text->text.toStdString();
                    EXPECT_LE(text->x + measure.width(text->text, text->font), sheet_size(page.landscape).width() - 30.0)
                        << cylinders << ": " << text->text.toStdString();
                    EXPECT_LE(text->baseline, sheet_size(page.landscape).height() - 20.0);
                }
    }
}

/// Texts of a page that cover each other: same height, and one begins before the other ends.
QStringList covered_texts(const ReportPage& page)
{
    const TextMeasure measure;
    std::vector<const TextItem*> texts;
    for (const PageItem& item : page.items)
        if (const TextItem* text = std::get_if<TextItem>(&item))
            texts.push_back(text);
    QStringList covered;
    for (std::size_t i = 0; i < texts.size(); ++i)
        for (std::size_t j = i + 1; j < texts.size(); ++j) {
            const TextItem &a = *texts[i], &b = *texts[j];
            const double a_end = a.x + measure.width(a.text, a.font), b_end = b.x + measure.width(b.text, b.font);
            // Six points: two lines of nine-point type stand at least eleven apart.
            if (std::abs(a.baseline - b.baseline) < 6.0 && a.x < b_end - 0.5 && b.x < a_end - 0.5)
                covered.append(a.text + QStringLiteral(" | ") + b.text);
        }
    return covered;
}

TEST_F(SurveyPdf, NoTextCoversAnother)
{
    for (const int cylinders : {1, 6, 8, 12, 20}) {
        Judgement judgement = long_judgement(cylinders, 14);
        const Level levels[] = {Level::learning, Level::note, Level::ask, Level::watch, Level::act, Level::quiet};
        for (std::size_t i = 0; i < judgement.trends.size(); ++i) {
            judgement.trends[i].level = levels[i % 6];
            judgement.trends[i].learned = 4;
        }
        const ReportLayout layout = lay_out(std::make_shared<const SurveyReport>(report_of(judgement, 14)));
        for (const ReportPage& page : layout.pages)
            for (const QString& texts : covered_texts(page))
                ADD_FAILURE() << cylinders << " cylinders: " << texts.toStdString();
    }
}

TEST_F(SurveyPdf, AllSignaturesStandOnOnePage)
{
    for (int months = 6; months < 20; ++months) {
        const ReportLayout layout = lay_out(std::make_shared<const SurveyReport>(report_of(long_judgement(6, months), months)));
        const auto page_of = [&](const char* words) {
            for (std::size_t i = layout.pages.size(); i-- > 0;)
                for (const PageItem& item : layout.pages[i].items)
                    if (const TextItem* text = std::get_if<TextItem>(&item); text && text->text == QLatin1String(words))
                        return i;
            return std::size_t{9999};
        };
        EXPECT_EQ(page_of("Signatures"), layout.pages.size() - 1) << months;
        EXPECT_EQ(page_of("Chief engineer"), page_of("Surveyor")) << months;
    }
}

TEST_F(SurveyPdf, HeadsOfTablesRepeatOnEachPage)
{
    const ReportLayout layout = lay_out(std::make_shared<const SurveyReport>(report_of(long_judgement(6, 60), 60)));
    int continued = 0;
    for (const ReportPage& page : layout.pages)
        for (const PageItem& item : page.items)
            if (const TextItem* text = std::get_if<TextItem>(&item); text && text->text.endsWith("(continued)"))
                ++continued;
    EXPECT_GT(continued, 10);
}

TEST_F(SurveyPdf, TheSummaryNamesThePagesOfFlagsAndTrends)
{
    const ReportLayout layout = lay_out(std::make_shared<SurveyReport>(report_of(long_judgement(6, 14), 12)));
    const auto page_of = [&](const QString& title) {
        for (std::size_t page = 0; page < layout.pages.size(); ++page)
            for (const PageItem& item : layout.pages[page].items)
                if (const TextItem* text = std::get_if<TextItem>(&item); text && text->text == title)
                    return QString::number(page + 1);
        return QString();
    };
    QString all;
    for (const PageItem& item : layout.pages[0].items)
        if (const TextItem* text = std::get_if<TextItem>(&item))
            all += text->text + QLatin1Char(' ');
    for (const PageItem& item : layout.pages[1].items)
        if (const TextItem* text = std::get_if<TextItem>(&item))
            all += text->text + QLatin1Char(' ');
    EXPECT_TRUE(all.contains(QStringLiteral("\u201cFlags and questions\u201d, page\u00a0") + page_of("Flags and questions"))) << all.toStdString();
    EXPECT_TRUE(all.contains(QStringLiteral("\u201cTrends\u201d, page\u00a0") + page_of("Trends"))) << all.toStdString();
}

TEST(EventLabels, EveryTickHasItsWordOrANumberWithAKey)
{
    report::Plot plot;
    plot.from = 0.0;
    plot.to = 365.0 * 86400.0;
    const auto add = [&](double days, const char* text) { plot.events.push_back({days * 86400.0, text}); };
    add(20.0, "overhaul");
    add(100.0, "fuel valves changed");
    add(105.0, "turbocharger washed");
    add(106.0, "fuel changed");
    add(250.0, "note");
    const EventLabels labels = label_events(plot, 500.0, TextMeasure());
    EXPECT_EQ(labels.at_tick[0], "overhaul");
    EXPECT_TRUE(labels.is_number[1] && labels.is_number[2]) << "a word would run through the next tick";
    // Three ticks so close that one list of numbers stands for them.
    EXPECT_EQ(labels.at_tick[1], "1,2,3");
    EXPECT_TRUE(labels.key.contains("fuel changed")) << labels.key.toStdString();
    EXPECT_EQ(labels.at_tick[4], "note");
    EXPECT_TRUE(labels.key.contains(QStringLiteral("1\u00a01970-04-11\u00a0fuel valves changed"))) << labels.key.toStdString();
}

TEST_F(SurveyPdf, StoppedWritingLeavesTheOldFile)
{
    QFile old(path("kept.pdf"));
    ASSERT_TRUE(old.open(QIODevice::WriteOnly));
    old.write("the old report");
    old.close();
    const auto written = write_survey_pdf(report_of(make_judgement(), 12), path("kept.pdf"), [](int done, int) { return done < 2; });
    EXPECT_FALSE(written.has_value());
    EXPECT_EQ(whole_file(path("kept.pdf")), "the old report");
    EXPECT_EQ(QDir(folder_.path()).entryList(QDir::Files).size(), 1) << "no half file beside it";
}

TEST_F(SurveyPdf, FolderThatIsNotThereIsSaidInWords)
{
    const auto written = write_survey_pdf(report_of(make_judgement(), 12), path("nowhere/report.pdf"));
    ASSERT_FALSE(written.has_value());
    EXPECT_EQ(written.error().kind, Problem::Kind::storage);
    EXPECT_NE(written.error().what_happened.find("nowhere/report.pdf"), std::string::npos);
}

TEST_F(SurveyPdf, TextFileHoldsTheSame)
{
    const SurveyReport report = report_of(make_judgement(), 12);
    ASSERT_TRUE(write_survey_text(report, path("report.txt")).has_value());
    EXPECT_EQ(whole_file(path("report.txt")), report_as_text(report));
}

TEST_F(SurveyPdf, GoesToAPrinterWithTheSamePages)
{
    const ReportLayout layout = lay_out(std::make_shared<const SurveyReport>(report_of(make_judgement(), 12)));
    QPrinter printer(QPrinter::HighResolution);
    printer.setOutputFormat(QPrinter::PdfFormat);
    printer.setOutputFileName(path("printed.pdf"));
    print_report(layout, printer);
    const auto information = output_of("pdfinfo", {path("printed.pdf")});
    if (!information)
        GTEST_SKIP() << "pdfinfo is not installed";
    EXPECT_TRUE(QString::fromUtf8(*information).simplified().contains(QStringLiteral("Pages: %1 ").arg(layout.pages.size())));
}

} // namespace
} // namespace evenstroke
