// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>
#include <QWidget>

namespace evenstroke {

/// Keeps a picture for a person to look at where EVENSTROKE_PICTURES names a folder; does nothing otherwise.
inline void keep_picture(QWidget& widget, const QString& name)
{
    const QString folder = qEnvironmentVariable("EVENSTROKE_PICTURES");
    if (!folder.isEmpty())
        widget.grab().save(folder + u'/' + name + QStringLiteral(".png"));
}

/// Whether a picture shows more than one colour.
inline bool shows_something(const QImage& picture)
{
    for (int y = 0; y < picture.height(); ++y)
        for (int x = 0; x < picture.width(); ++x)
            if (picture.pixel(x, y) != picture.pixel(0, 0))
                return true;
    return false;
}

} // namespace evenstroke
