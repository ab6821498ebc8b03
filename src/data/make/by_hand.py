"""Figures corrected by hand: strokes through stars by Bayer letter or Flamsteed number ("Tau:β": another constellation's).

Where observers name a shape (the Plough, the Sickle, the Teapot ...), the stroke follows the name; where the rule made two
animals of one or left a shape open that the bright stars close, the bright stars decide.
"""

BY_HAND = {
    "And": ["α δ β γ", "β μ ν", "δ ε ζ", "δ π"],
    "Aqr": ["ε μ β α γ ζ η", "ζ π α", "α θ λ τ² δ 88", "β ι"],
    "Ara": ["θ α β γ δ η ζ ε¹ α"],
    "Ari": ["41 α β γ"],
    "Aur": ["α β θ Tau:β ι η ε α", "α δ β"],
    "Boo": ["α ε δ β γ ρ α", "η α ζ"],  # the Kite
    "CMi": ["α β"],
    "CVn": ["α β"],
    "Cap": ["α² β ψ ω ζ ε δ γ ι θ β"],
    "Car": ["α χ ε ι υ β ω θ υ"],
    "Cas": ["ε δ γ α β"],  # the W
    "Cen": ["α β ε ζ μ ν θ", "ν ι", "ζ η κ", "ε γ δ π"],
    "Cep": ["β α ζ ι β γ ι", "α η"],
    "Cir": ["β α γ"],
    "Cnc": ["ι γ δ α", "δ β"],
    "Com": ["α β γ"],
    "CrA": ["ε γ α β δ ζ"],
    "CrB": ["θ β α γ δ ε ι"],  # the Northern Crown's arc
    "Crt": ["α β γ δ α", "δ ε θ", "γ ζ η"],  # the cup
    "Cru": ["α γ", "β δ"],  # the Southern Cross
    "Crv": ["γ δ β ε γ", "ε α"],
    "Cyg": ["α γ η β", "ζ ε γ δ ι² κ"],  # the Northern Cross, its wings drawn on
    "Del": ["α γ δ β α", "β ε"],
    "Dra": ["β γ ξ ν² β", "ξ δ ε χ ζ η θ ι α κ λ"],
    "Eri": ["β μ ν ο¹ γ π δ ε η τ¹ τ³ τ⁴ τ⁵ τ⁶ τ⁸ τ⁹ υ¹ υ² υ⁴ θ ι κ φ χ α"],
    "For": ["ν β α"],
    "Gem": ["α τ ε μ η", "β υ δ ζ γ", "δ λ ξ", "τ ι υ"],
    "Gru": ["γ λ μ¹ δ¹ β ε ζ", "α β ι"],
    "Her": ["ε π η ζ ε δ α β ζ", "π θ ι", "η σ τ", "β γ"],  # with the Keystone
    "Hya": ["ζ ε δ σ η ζ", "ζ θ ι α υ¹ λ μ ν ξ β γ π"],
    "Leo": ["ε μ ζ γ η α", "γ δ β θ α", "δ θ"],  # with the Sickle
    "Lep": ["κ μ α ζ η", "μ ε β γ δ α β"],
    "Lib": ["σ α² β γ υ", "α² γ"],
    "Lyr": ["α ζ δ² γ β ζ", "α ε² ζ"],
    "Mus": ["λ ε α β δ γ α"],
    "Oct": ["δ ν β δ"],
    "Ori": ["α γ δ ε ζ α λ γ", "ζ κ β δ", "γ π³", "π¹ π² π³ π⁴ π⁵"],  # shoulders, Belt, knees; the shield
    "Peg": ["α β And:α γ α", "α ζ θ ε", "β η π²", "β μ λ ι κ"],  # with the Great Square
    "Per": ["η γ α δ ε ξ ζ", "α κ β ρ"],
    "PsA": ["α ε λ ι μ β γ δ α"],
    "Psc": ["γ κ λ ι θ γ", "ι ω δ ε ζ μ ν α ο η ρ φ τ υ φ"],  # with the Circlet
    "Pic": ["α γ β"],
    "Pup": ["ρ ξ π ν τ σ ζ ρ"],
    "Pyx": ["β α γ"],
    "Ret": ["α β δ ε α"],
    "Sco": ["β δ π ρ", "δ σ α τ ε μ¹ ζ² η θ ι¹ κ λ υ"],  # with the Hook
    "Ser": {"caput": ["ι κ γ β ι", "β δ α ε μ"], "cauda": ["ν ξ ο η θ"]},
    "Sex": ["γ α β δ"],
    "Sge": ["γ δ α", "δ β"],
    "Sgr": ["ε δ λ φ ζ ε", "φ δ γ² ε", "φ σ τ ζ", "ε η", "λ μ", "σ ο π"],  # with the Teapot
    "Tau": ["ζ α θ² γ δ¹ ε β", "γ λ ξ ο"],  # the V of the Hyades, drawn on to the horn tips
    "TrA": ["α β γ α"],
    "Tri": ["α β γ α"],
    "UMa": ["η ζ ε δ α β γ δ", "α 23 ο", "β υ θ ι", "γ χ ψ μ", "χ ν ξ", "ψ λ"],  # with the Plough
    "UMi": ["α δ ε ζ β γ η ζ"],  # the Little Dipper
    "Vel": ["γ λ ψ μ φ κ δ γ"],
    "Vir": ["ν β η γ α", "γ δ ε", "δ ζ α", "ζ τ 109", "α κ ι μ"],
}

# Key for the words files: constellation whose letters are meant, stars in order.
ASTERISMS = {
    "plough": ("UMa", "α β γ δ ε ζ η"),
    "pointers-north": ("UMa", "α β"),
    "little-dipper": ("UMi", "α δ ε ζ β γ η"),
    "sickle": ("Leo", "ε μ ζ γ η α"),
    "belt": ("Ori", "δ ε ζ"),
    "great-square": ("Peg", "α β And:α γ"),
    "teapot": ("Sgr", "ε δ γ² λ φ σ τ ζ"),
    "southern-cross": ("Cru", "α β γ δ"),
    "pointers-south": ("Cen", "α β"),
    "northern-cross": ("Cyg", "α γ β ε δ"),
    "keystone": ("Her", "π η ζ ε"),
    "w": ("Cas", "ε δ γ α β"),
    "kite": ("Boo", "α ε δ β γ ρ"),
    "hook": ("Sco", "ε μ¹ ζ² η θ ι¹ κ λ υ"),
    "northern-crown": ("CrB", "θ β α γ δ ε ι"),
    "circlet": ("Psc", "γ κ λ ι θ"),
    "water-jar": ("Aqr", "γ ζ η π"),
    "false-cross": ("Car", "ι ε Vel:κ Vel:δ"),
    "hyades-v": ("Tau", "α θ² γ δ¹ ε"),
    "head-of-the-dragon": ("Dra", "β γ ξ ν²"),
    "deneb-vega-altair": ("Cyg", "α Lyr:α Aql:α"),
    "sirius-procyon-betelgeuse": ("CMa", "α CMi:α Ori:α"),
}
