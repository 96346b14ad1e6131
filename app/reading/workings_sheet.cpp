// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/workings_sheet.h"

#include "app/reading/sheet_number.h"

#include <QCoreApplication>
#include <QPainter>
#include <QTextDocument>
#include <QUrl>

#include <cmath>

namespace evenstroke {

namespace {

constexpr int bar_width = 60, narrow_bar_width = 36, bar_height = 10, sharpness = 3; // a bar is drawn finer than it is shown, for paper
constexpr double bar_thickness = 4.0;

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }
QString plain(const std::string& text) { return to_qstring(text).toHtmlEscaped(); }

/// A difference is neither over the barometer nor over vacuum, and of temperatures it is kelvin.
QString difference_unit(const std::string& unit)
{
    QString symbol = to_qstring(unit);
    for (const QString& kind : {QStringLiteral(" gauge"), QStringLiteral(" abs")})
        if (symbol.endsWith(kind))
            symbol.chop(kind.size());
    return symbol == QStringLiteral("°C") ? QStringLiteral("K") : symbol;
}

QString style(const Theme& t)
{
    return QStringLiteral("body { color: %1; font-size: 10.5pt; } p { margin: 0px; } "
                          ".muted { color: %2; } .small { font-size: 9pt; color: %2; } .title { font-size: 14pt; } "
                          ".figure { font-size: 20pt; font-weight: bold; } .formula { font-size: 11pt; } "
                          "h4 { color: %2; font-size: 9pt; font-weight: normal; margin-top: 14px; margin-bottom: 2px; }")
        .arg(t.ink.name(), t.muted.name());
}

/// Writes the sheet's parts one after the other.
class SheetWriter
{
public:
    SheetWriter(QTextDocument& document, const Workings& workings, const Theme& colours, bool narrow)
        : document_(document), sheet_(workings), theme_(colours), narrow_(narrow)
    {
    }

    QString html(const SheetHeading& heading)
    {
        text_ = QStringLiteral("<body>");
        if (!heading.title.isEmpty())
            line("title", heading.title.toHtmlEscaped());
        if (!heading.where.isEmpty())
            line("muted", heading.where.toHtmlEscaped());
        add_result();
        add_formula();
        add_inputs();
        add_steps();
        add_remarks();
        return text_ + QStringLiteral("</body>");
    }

private:
    void line(const char* kind, const QString& words)
    {
        text_ += QStringLiteral("<p class=\"%1\">%2</p>").arg(QLatin1String(kind), words);
    }
    void head(const QString& words) { text_ += QStringLiteral("<h4>%1</h4>").arg(words.toHtmlEscaped()); }
    /// A number in two cells, so that the column lines up on the decimal sign.
    QString number_cells(const QString& number, int space = 16) const
    {
        const auto [left, right] = at_decimal_sign(number);
        return QStringLiteral("<td align=\"right\" style=\"padding-left: %3px; white-space: pre;\">%1</td>"
                              "<td style=\"white-space: pre;\">%2</td>")
            .arg(left, right)
            .arg(space);
    }
    QString cell(const QString& words, int space = 0) const
    {
        return QStringLiteral("<td style=\"padding-left: %2px;\">%1</td>").arg(words).arg(space);
    }
    QString small(const QString& words) const { return QStringLiteral("<span class=\"small\">%1</span>").arg(words); }
    void begin_table() { text_ += QStringLiteral("<table cellspacing=\"0\" cellpadding=\"0\">"); }
    void end_table() { text_ += QStringLiteral("</table>"); }

    void add_result()
    {
        if (!sheet_.missing.empty() && !sheet_.value) {
            text_ += QStringLiteral("<p class=\"title\" style=\"margin-top: 8px;\">%1</p>").arg(tr_("Not known"));
            line("", plain(sheet_.missing));
            return;
        }
        text_ += QStringLiteral("<p class=\"figure\" style=\"margin-top: 8px;\">%1</p>").arg(result_text(sheet_).toHtmlEscaped());
        if (sheet_.value && !sheet_.half_width)
            line("small", tr_("No ±: an instrument that counts states none.").toHtmlEscaped());
        QStringList became;
        const auto add = [&](const std::optional<double>& value, const QString& words, bool difference) {
            if (value)
                became.append(tr_("%1 %2").arg(words, with_unit(difference ? signed_text(*value, sheet_.decimals)
                                                                           : number_text(*value, sheet_.decimals),
                                                                difference ? difference_unit(sheet_.unit) : to_qstring(sheet_.unit))));
        };
        add(sheet_.corrected, tr_("corrected"), false);
        add(sheet_.expected, tr_("expected"), false);
        add(sheet_.deviation, tr_("deviation"), true);
        if (sheet_.deviation && sheet_.deviation_half_width)
            became.back() = tr_("deviation %1").arg(with_unit(
                with_uncertainty(*sheet_.deviation, sheet_.deviation_half_width, sheet_.decimals), difference_unit(sheet_.unit)));
        add(sheet_.apart, tr_("apart from the others"), true);
        add(sheet_.from_usual, tr_("from its own usual level"), true);
        if (!became.isEmpty())
            line("", became.join(QStringLiteral(" · ")).toHtmlEscaped());
    }

    void add_formula()
    {
        if (sheet_.formula.empty())
            return;
        head(tr_("Formula"));
        QString formula = plain(sheet_.formula);
        line("formula", formula.replace(u'\n', QStringLiteral("<br>")));
        if (!sheet_.source.empty())
            line("small", tr_("Source: %1").arg(plain(sheet_.source)));
        if (!sheet_.validity.empty())
            line("small", tr_("Good for: %1").arg(plain(sheet_.validity)));
    }

    void add_inputs()
    {
        if (sheet_.inputs.empty())
            return;
        head(sheet_.deviation_half_width ? tr_("What went into it, and its share of the deviation's ±")
                                         : tr_("What went into it, and its share of the uncertainty"));
        begin_table();
        for (const WorkingInput& input : sheet_.inputs)
            add_input(input);
        end_table();
    }

    void add_input(const WorkingInput& input)
    {
        QString words = plain(input.words);
        if (input.place.kind == Place::Kind::cylinder || input.place.number > 1)
            words += small(QStringLiteral(" %1").arg(to_qstring(place_text(input.place)).toHtmlEscaped()));
        if (narrow_) {
            add_narrow_input(input, words);
            return;
        }
        const QString half = input.half_width ? QStringLiteral("±%1%2").arg(QChar(0x00A0)).arg(sheet_number(*input.half_width))
                                              : small(tr_("no ±"));
        text_ += QStringLiteral("<tr>") + cell(plain(input.symbol)) + cell(words, 10) + number_cells(sheet_number(input.value))
                 + cell(small(plain(input.unit)), 6) + cell(half, 12);
        text_ += QStringLiteral("<td style=\"padding-left: 14px;\" align=\"right\">%1</td><td style=\"padding-left: 6px;\">%2</td>")
                     .arg(input.share ? number_text(100.0 * *input.share, 0) + QChar(0x00A0) + u'%' : QString(),
                          input.share ? bar(*input.share) : QString());
        text_ += cell(small(plain(input.origin)), 14) + QStringLiteral("</tr>");
    }

    /// Beside the judged reading: words and number in one line, symbol, ± and origin in small type below them.
    void add_narrow_input(const WorkingInput& input, const QString& words)
    {
        text_ += QStringLiteral("<tr>") + cell(words) + number_cells(sheet_number(input.value), 8)
                 + QStringLiteral("<td style=\"padding-left: 6px; white-space: pre;\">%1</td>").arg(small(plain(input.unit)))
                 + QStringLiteral("<td style=\"padding-left: 10px; white-space: pre;\" align=\"right\">%1</td><td style=\"padding-left: 4px;\">%2</td></tr>")
                       .arg(input.share ? number_text(100.0 * *input.share, 0) + QChar(0x00A0) + u'%' : QString(),
                            input.share ? bar(*input.share) : QString());
        QStringList below{plain(input.symbol)};
        below.append(input.half_width ? QStringLiteral("±%1%2").arg(QChar(0x00A0)).arg(sheet_number(*input.half_width)) : tr_("no ±"));
        below.append(plain(input.origin));
        below.removeAll(QString());
        text_ += QStringLiteral("<tr><td colspan=\"6\" style=\"padding-bottom: 3px;\">%1</td></tr>").arg(small(below.join(QStringLiteral(" · "))));
    }

    QString bar(double share)
    {
        const int percent = static_cast<int>(std::lround(100.0 * std::min(1.0, std::max(0.0, share))));
        const QString name = QStringLiteral("share:%1").arg(percent);
        QImage picture(bar_width * sharpness, bar_height * sharpness, QImage::Format_ARGB32_Premultiplied);
        picture.fill(Qt::transparent);
        QPainter painter(&picture);
        painter.scale(sharpness, sharpness); // drawn for the wide sheet; the narrow one shows it smaller
        const double top = (bar_height - bar_thickness) / 2.0;
        painter.fillRect(QRectF(0, top, bar_width, bar_thickness), theme_.rule);
        painter.fillRect(QRectF(0, top, bar_width * percent / 100.0, bar_thickness), theme_.line);
        painter.end();
        document_.addResource(QTextDocument::ImageResource, QUrl(name), picture);
        return QStringLiteral("<img src=\"%1\" width=\"%2\" height=\"%3\">").arg(name).arg(narrow_ ? narrow_bar_width : bar_width).arg(bar_height);
    }

    void add_steps()
    {
        if (sheet_.steps.empty())
            return;
        head(tr_("On the way"));
        begin_table();
        for (const WorkingStep& step : sheet_.steps)
            text_ += QStringLiteral("<tr>") + cell(plain(step.words)) + number_cells(sheet_number(step.value))
                     + cell(small(plain(step.unit)), 6) + QStringLiteral("</tr>");
        end_table();
    }

    void add_remarks()
    {
        std::vector<std::string> remarks = sheet_.remarks;
        if (sheet_.value && !sheet_.missing.empty())
            remarks.push_back(sheet_.missing);
        if (sheet_.formula.empty() && !sheet_.source.empty())
            remarks.push_back(to_std(tr_("Source: %1").arg(to_qstring(sheet_.source))));
        if (sheet_.formula.empty() && !sheet_.validity.empty())
            remarks.push_back(to_std(tr_("Good for: %1").arg(to_qstring(sheet_.validity))));
        if (remarks.empty())
            return;
        head(tr_("To be kept in mind"));
        for (const std::string& remark : remarks)
            line("", plain(remark));
    }

    QTextDocument& document_;
    const Workings& sheet_;
    const Theme& theme_;
    bool narrow_;
    QString text_;
};

} // namespace

QString result_text(const Workings& workings)
{
    if (!workings.value)
        return tr_("not known");
    return with_unit(with_uncertainty(*workings.value, workings.half_width, workings.decimals), to_qstring(workings.unit));
}

void fill_sheet(QTextDocument& document, const Workings& workings, const SheetHeading& heading, const Theme& colours, bool narrow)
{
    document.clear();
    document.setDefaultFont(type(TypeSize::body));
    document.setDocumentMargin(0);
    document.setDefaultStyleSheet(style(colours));
    document.setHtml(SheetWriter(document, workings, colours, narrow).html(heading));
}

} // namespace evenstroke
